import { useMemo } from 'react';
import type { Entry } from '#shared/contracts/entries.ts';
import { countInWords, formatCount, formatNumber, formatRange, plural } from '#shared/domain/format.ts';
import { EmptyState } from '#web/components/blank-state.tsx';
import { Section } from '#web/components/section.tsx';
import { misfitNotes } from '../entry-words.ts';
import { SealedCharts } from './sealed-charts.tsx';

const digits = 4;

const verdict = (check: NonNullable<Entry['sealedCheck']>): string => {
  if (check.passed) return 'The estimate predicted circuits it had never seen about as well as shot noise allows.';
  return check.value > check.high99 ? 'The estimate predicted sealed circuits worse than chance allows at 99 %. Something in the run is not in the model.' : 'The estimate predicted sealed circuits better than shot noise allows at 99 %. The counts scatter less than counts do.';
};

function Misfit({ entry }: { entry: Entry }) {
  return misfitNotes(entry).map((sentence) => <p key={sentence}><strong>Misfit</strong>{sentence}</p>);
}

/** The circuits that the prediction is tested on: those over the whole register. A point's outcome has one digit a qubit. */
const wholeRegister = (entry: Entry): Entry['sealedPoints'] => entry.sealedPoints.filter((p) => p.outcome.length === entry.register.length);

/** The test on circuits that the estimate never saw. */
export function SealedSection({ entry }: { entry: Entry }) {
  const { sealedCheck: check, circuits, provenance } = entry;
  const whole = useMemo(() => wholeRegister(entry), [entry]);
  const notes = (
    <>
      <Misfit entry={entry} />
      {entry.patches.length > 1 && whole.length > 0 && whole.length < circuits.sealed && check ? <p>The prediction is tested on the {formatCount(whole.length)} sealed circuits that run over the whole register. The others belong to single patches and are left out here.</p> : null}
      {provenance.runSheet ? <p>The choice was sealed by a hash printed on run sheet {provenance.runSheet} and revealed at freezing.</p> : null}
    </>
  );
  return (
    <Section title="Sealed circuits" aside={circuits.sealed > 0 ? `${formatCount(circuits.sealed)} ${plural(circuits.sealed, 'circuit')} kept out of the estimate, chosen before the run.` : undefined} notes={notes}>
      {check ? (
        <>
          <p className="opening mid">{verdict(check)}</p>
          {whole.length > 1 ? <SealedCharts entry={entry} sealed={whole} /> : null}
          <table className="tight cmp4">
            <caption className="unseen">Prediction error on {countInWords(whole.length)} sealed circuits</caption>
            <thead><tr><th scope="col">Mean total variation distance</th><th scope="col" className="n">Value</th><th scope="col">Reading</th></tr></thead>
            <tbody>
              <tr><th scope="row" className="row">This estimate</th><td className="n">{formatNumber(check.value, digits)}</td><td>{check.passed ? 'Passes: inside' : 'Does not pass: outside'} the 99 % range, {formatRange(check.low99, check.high99, digits)}</td></tr>
              <tr><th scope="row">Shot noise alone</th><td className="n">{formatNumber(check.noise, digits)}</td><td>The least that any prediction can reach on average</td></tr>
              <tr><th scope="row">Ideal device</th><td className="n">{formatNumber(check.ideal, digits)}</td><td>What a prediction without any error model gives</td></tr>
            </tbody>
          </table>
        </>
      ) : (
        <EmptyState title="No circuit was sealed">The circuits are the contributor’s own design, so none could be kept out in advance and the prediction was not tested.</EmptyState>
      )}
    </Section>
  );
}
