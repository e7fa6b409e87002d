import { sha256Hex } from '#shared/formats/canonical-json.ts';
import { checkDigest, checkFiles } from '#shared/recompute/check-files.ts';
import { compareResults } from '#shared/recompute/compare.ts';
import { recompute } from '#shared/recompute/recompute.ts';
import type { Agreement, FileCheck } from '#shared/recompute/types.ts';
import { checkLogProof } from './log-proof.ts';
import { checkLine, comparisonLines } from './report.ts';
import { recordedOf, type EntrySource } from './source.ts';

/** Exit status: all agree; something disagrees. */
const AGREES = 0;
const DISAGREES = 1;

type Say = (line: string) => void;

const showProgress = ({ stage, fraction }: { stage: string; fraction: number }): void => {
  if (process.stderr.isTTY) process.stderr.write(`\r${stage.padEnd(10)} ${String(Math.round(100 * fraction)).padStart(3)} %`);
};
const endProgress = (): void => {
  if (process.stderr.isTTY) process.stderr.write(`\r${' '.repeat(20)}\r`);
};

const hasFault = (checks: readonly FileCheck[]): boolean => checks.some(({ outcome }) => outcome === 'differs');

/** A withdrawn entry: what is still handed out is held to the record; its figures cannot be made again. */
function verifyWithdrawn(name: string, { facts, result, proof, withdrawal }: EntrySource, say: Say): number {
  const checks = [checkDigest('result-bytes', 'SHA-256 of the frozen result', facts.resultSha256, sha256Hex(result)), ...checkLogProof(proof, facts, 'frozen'), ...checkLogProof(withdrawal, facts, 'withdrawn')];
  checks.forEach((check) => say(checkLine(check)));
  const faulty = hasFault(checks);
  say(faulty ? `${name} was withdrawn, and what is left of it does not agree with the record.` : `${name} was withdrawn: its data is not handed out, so that only hashes and proof could be checked. They agree; its figures were not recomputed.`);
  return faulty ? DISAGREES : AGREES;
}

const verdicts: Readonly<Record<Agreement, (name: string) => string>> = {
  identical: (name) => `All agree: ${name} recomputed is identical, bit for bit.`,
  close: (name) => `All agree: ${name} recomputed is the same within 1e-9, though not bit for bit.`,
  differs: (name) => `Not all agree: ${name} recomputed differs from what was frozen, as told above.`,
};

/** Holds an entry to its record, makes its figures again and says what agrees; the exit status. Cost: that of the estimate. */
export function verify(source: EntrySource, say: Say): number {
  const { facts, dataset, result, replicates, seal, runSheet, proof } = source;
  const name = `${facts.accession}.${facts.version}`;
  say(`${name}, content id ${facts.contentId}`);
  if (dataset === null) return verifyWithdrawn(name, source, say);
  const { checks, ready } = checkFiles({ dataset, result, replicates, seal, runSheet }, recordedOf(facts));
  const before = [...source.checks, ...checks, ...checkLogProof(proof, facts, 'frozen')];
  before.forEach((check) => say(checkLine(check)));
  if (!ready) {
    say(`Not all agree: ${name} could not be recomputed, for the reason told above.`);
    return DISAGREES;
  }
  const again = recompute(ready, showProgress);
  endProgress();
  const comparison = compareResults(ready.result, facts.resultSha256, { sha256: facts.replicatesSha256, bytes: replicates }, again, ready.dataset);
  comparisonLines(comparison).forEach(say);
  const faulty = hasFault(before);
  say(faulty && comparison.agreement !== 'differs' ? `Not all agree: the figures of ${name} do, but not all of its files, as told above.` : verdicts[comparison.agreement](name));
  return faulty || comparison.agreement === 'differs' ? DISAGREES : AGREES;
}
