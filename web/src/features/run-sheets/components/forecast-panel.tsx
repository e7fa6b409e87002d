import { useMemo } from 'react';
import type { GateClassSummary } from '#shared/contracts/gate-classes.ts';
import { countInWords, formatCount, formatNumber } from '#shared/domain/format.ts';
import { PlannerChart } from '#web/charts/planner-chart.tsx';
import { Facts } from '#web/components/facts.tsx';
import { Message } from '#web/components/message.tsx';
import { headlineWidth, plannerCurves, samplesOf, type CheapPlan } from '../plan-forecast.ts';
import type { Plan } from '../plan-schema.ts';
import { forecastRows, timeWords, widthWords } from '../plan-words.ts';
import { sheetSize, totalShots } from '../sheet-size.ts';
import type { ForecastState } from '../use-forecast.ts';

interface PanelProps {
  plan: Plan;
  gateClass: GateClassSummary;
  forecast: ForecastState;
  /** Have all numbers of circuits been tried? */
  climbed: boolean;
  cheapest: CheapPlan | null;
}

/** The right column for a class that can be forecast: what this plan costs and what it buys. */
export function ForecastPanel({ plan, gateClass, forecast, climbed, cheapest }: PanelProps) {
  const unit = forecast.units.get(plan.circuits);
  const cost = totalShots(gateClass, plan.circuits, plan.shots);
  const width = unit ? headlineWidth(unit, plan.shots) : null;
  const curves = useMemo(() => plannerCurves(gateClass, forecast.units, { circuits: plan.circuits, shots: plan.shots }), [gateClass, forecast.units, plan.circuits, plan.shots]);
  if (forecast.fault) return <Message kind="fault" live>{forecast.fault} The sheet can be drawn without a forecast.</Message>;
  return (
    <>
      <p className="opening" role="status">
        This plan costs <b>{formatCount(cost)} shots</b>{width ? <> and would leave retained signal at depth 16 uncertain by <b className="nowrap">{widthWords(width.typical)}</b>. <WantedWords plan={plan} width={width.typical} climbed={climbed} cheapest={cheapest} /></> : unit ? '. Retained signal at depth 16 is not determined by this gate set.' : '. The forecast is being worked out.'}
      </p>
      {width ? <p className="says">Sheets differ by chance: of {countInWords(samplesOf(gateClass))} drawn like this one the narrowest gave {widthWords(width.least)}, the widest {widthWords(width.most)}.</p> : null}
      {unit && curves.length > 0 ? (
        <PlannerChart curves={curves} plan={width ? { shots: cost, halfWidth: width.typical } : null} wanted={plan.wanted} cheapest={cheapest} fileName="run-sheet-plan" />
      ) : null}
      {unit ? <ForecastTable rows={forecastRows(unit, plan.shots, gateClass.gates)} several={gateClass.registerSize > 1} /> : null}
      {unit ? <PlanFacts gateClass={gateClass} plan={plan} rank={unit.rank} ratio={unit.conditionRatio} /> : null}
    </>
  );
}

function WantedWords({ plan, width, climbed, cheapest }: { plan: Plan; width: number; climbed: boolean; cheapest: CheapPlan | null }) {
  if (plan.wanted === null) return null;
  if (width <= plan.wanted) return <>That reaches the width you want.</>;
  if (!climbed) return <>That misses the width you want; the cheapest plan that reaches it is being looked for.</>;
  if (cheapest === null) return <>That misses the width you want, and so does every plan that a sheet may have.</>;
  return <>That misses the width you want; {formatCount(cheapest.circuits)} circuits of {formatCount(cheapest.shotsEach)} shots, {formatCount(cheapest.shots)} in all, would reach it.</>;
}

function ForecastTable({ rows, several }: { rows: ReturnType<typeof forecastRows>; several: boolean }) {
  return (
    <table className="tight forecasts">
      <caption>Forecast for this plan{several ? '; from the narrowest to the widest where several qubits or pairs have the figure' : ''}</caption>
      <thead><tr><th scope="col">Figure</th><th scope="col" className="n">95{'\u202f'}% half-width</th><th scope="col">Depends most on</th></tr></thead>
      <tbody>
        {rows.map((row) => (
          <tr key={row.name}>
            <th scope="row" className={row.headline ? 'row' : undefined}>{row.name}</th>
            {row.width ? <><td className="n">{row.width}</td><td>{row.dependsOn}</td></> : <td colSpan={2}><span className="undetermined">not determined by this gate set</span></td>}
          </tr>
        ))}
      </tbody>
    </table>
  );
}

function PlanFacts({ gateClass, plan, rank, ratio }: { gateClass: GateClassSummary; plan: Plan; rank: number; ratio: number }) {
  const { open, sealed } = sheetSize(gateClass, plan.circuits);
  return (
    <div className="soundness">
      <Facts items={[
        { term: 'Rank', value: `${rank} of ${gateClass.expectedRank}${gateClass.kind === 'chained' ? ' in every pair' : ''}` },
        { term: 'Smallest to largest singular value', value: `${formatNumber(ratio, 3)}, floor 0.01` },
        { term: 'Sealed', value: `${formatCount(sealed)} on top of ${formatCount(open)}` },
        { term: 'Time at 1 kHz', value: timeWords(totalShots(gateClass, plan.circuits, plan.shots)) },
      ]} />
    </div>
  );
}
