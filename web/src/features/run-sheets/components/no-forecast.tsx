import type { GateClassSummary } from '#shared/contracts/gate-classes.ts';
import { formatCount } from '#shared/domain/format.ts';
import { Facts } from '#web/components/facts.tsx';
import type { Plan } from '../plan-schema.ts';
import { timeWords } from '../plan-words.ts';
import { sheetSize, totalShots } from '../sheet-size.ts';

/** The right column where there is no forecast, for registers too large for a browser and for structured sheets: the cost, and plainly no forecast. */
export function NoForecast({ plan, gateClass }: { plan: Plan; gateClass: GateClassSummary }) {
  const cost = totalShots(gateClass, plan.circuits, plan.shots);
  const { open, sealed } = sheetSize(gateClass, plan.circuits);
  return (
    <>
      <p className="opening" role="status">This plan costs <b>{formatCount(cost)} shots</b>.</p>
      <p className="says">{plan.kind === 'structured' ? 'There is no forecast for structured sheets: the widths are worked out for circuits drawn gate by gate. ' : `There is no live forecast for this class: working out the widths of a register of ${gateClass.registerSize} qubits takes a browser too long to follow your typing. `}The sheet is drawn until its design is sound, whatever the forecast; the intervals come with the estimate.</p>
      <div className="soundness">
        <Facts items={[
          { term: 'Circuits', value: `${formatCount(open)} to estimate from, ${formatCount(sealed)} sealed` },
          { term: 'Shots each', value: formatCount(plan.shots) },
          { term: 'Time at 1 kHz', value: timeWords(cost) },
        ]} />
      </div>
    </>
  );
}
