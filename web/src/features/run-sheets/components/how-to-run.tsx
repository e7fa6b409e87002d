import type { RunSheetView } from '#shared/contracts/run-sheets.ts';
import { Steps } from '#web/components/steps.tsx';
import { formatCount } from '#shared/domain/format.ts';
import { circuitsOf } from '../sheet-words.ts';

/** How to run a sheet and what to send back. */
export function HowToRun({ sheet }: { sheet: RunSheetView }) {
  const all = circuitsOf(sheet)?.all ?? 0;
  return (
    <Steps wide items={[
      <p key="run">Run all {formatCount(all)} circuits on {sheet.register.join(', ')} of {sheet.device.name}, {formatCount(sheet.shots)} shots each, neither more nor fewer. Gates stand in order of time; an empty list means: prepare and measure at once.</p>,
      <p key="order">Any order will do. Circuits that run together in time get the same number in <code>block</code>, so that drift between blocks can be tested.</p>,
      <p key="counts">Count outcomes as they come from the device. Do not correct them for readout, and leave none out: a circuit left out is seen, and the submission is blocked.</p>,
      <p key="file">Put the counts in one dataset file with the same circuit ids, and name this sheet: <code>{`"runSheet": {"id": "${sheet.id}", "sha256": "${sheet.sheetSha256 ?? ''}"}`}</code>.</p>,
      <p key="send">Submit the file. It is checked in your browser first.</p>,
    ]} />
  );
}

/** What the seal promises, in words, with the commitment itself. */
export function SealWords({ sheet }: { sheet: RunSheetView }) {
  return (
    <div className="prose">
      <p>{formatCount(sheet.sealed ?? 0)} of these circuits are sealed: the registry keeps them out of the estimate and tests its prediction on them. Which ones follows from a secret of 32 random bytes that was drawn with the sheet. The registry cannot change its choice any more, because you hold the SHA-256 of the secret:</p>
      <pre className="cmd">{sheet.sealSha256}</pre>
      <p>The secret is revealed when the entry is frozen. Anyone can then hash it, compare it with this line, and recompute which circuits it sealed.</p>
    </div>
  );
}
