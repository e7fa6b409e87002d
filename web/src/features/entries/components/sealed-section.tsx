import type { Entry } from '#shared/contracts/entries.ts';
import { countInWords, formatCount, formatNumber, formatRange, formatSigned, plural } from '#shared/domain/format.ts';
import { EmptyState } from '#web/components/blank-state.tsx';
import { Section } from '#web/components/section.tsx';
import { qubitNames } from '../entry-words.ts';
import { SealedCharts } from './sealed-charts.tsx';

const digits = 4;

const verdict = (check: NonNullable<Entry['sealedCheck']>): string => {
  if (check.passed) return 'The estimate predicted circuits it had never seen about as well as shot noise allows.';
  return check.value > check.high99 ? 'The estimate predicted sealed circuits worse than chance allows at 99 %. Something in the run is not in the model.' : 'The estimate predicted sealed circuits better than shot noise allows at 99 %. The counts scatter less than counts do.';
};

function Misfit({ entry }: { entry: Entry }) {
  return entry.patches.filter((p) => p.misfit !== null).map((patch) => (
    <p key={patch.qubits.join('-')}>
      <strong>Misfit</strong>{entry.patches.length > 1 ? ` of ${qubitNames(entry, patch.qubits)}` : ''} over the circuits of the estimate: {formatSigned(patch.misfit?.sigmas ?? 0, 1)} standard deviations from what the estimate leads one to expect.
      {Math.abs(patch.misfit?.sigmas ?? 0) <= 2.58 ? ' No sign of drift.' : ' Outside the 99 % range: drift, leakage, crosstalk, or counts that are not counts.'}
    </p>
  ));
}

/** The test on circuits that the estimate never saw. */
export function SealedSection({ entry }: { entry: Entry }) {
  const { sealedCheck: check, circuits, provenance } = entry;
  const notes = (
    <>
      <Misfit entry={entry} />
      {provenance.runSheet ? <p>The choice was sealed by a hash printed on run sheet {provenance.runSheet} and revealed at freezing.</p> : null}
    </>
  );
  return (
    <Section title="Sealed circuits" aside={circuits.sealed > 0 ? `${formatCount(circuits.sealed)} ${plural(circuits.sealed, 'circuit')} kept out of the estimate, chosen before the run.` : undefined} notes={notes}>
      {check ? (
        <>
          <p className="opening mid">{verdict(check)}</p>
          {entry.sealedPoints.length > 1 ? <SealedCharts entry={entry} /> : null}
          <table className="tight cmp4">
            <caption className="unseen">Prediction error on {countInWords(circuits.sealed)} sealed circuits</caption>
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
