import type { Check } from '#shared/contracts/common.ts';
import type { Review } from '#shared/contracts/reviews.ts';
import { countWords } from '#web/lib/count-words.ts';

/** Blocks beyond this many standard deviations are named; about one in twenty lies beyond by chance. */
export const driftSigmas = 2;

/** The sentences over a case, made from its checks, its sealed check and its blocks. */
export const openingWords = ({ submission, drift }: Pick<Review, 'drift'> & { submission: Pick<Review['submission'], 'checks' | 'result'> }): string =>
  [checkWords(submission.checks), sealedWords(submission.result?.sealedCheck ?? null), driftWords(drift)].filter((words) => words !== '').join(' ');

const checkWords = (checks: readonly Check[]): string => {
  const failed = checks.filter((c) => c.status === 'failed').length;
  const notes = checks.filter((c) => c.status === 'note').length;
  const passed = checks.length - failed;
  const withNotes = notes === 0 ? '' : `, with ${countWords(notes, 'note', 'notes').toLowerCase()}`;
  if (failed > 0) return `${countWords(failed, 'check', 'checks')} of ${checks.length} failed${withNotes}.`;
  return `All ${countWords(passed, 'check', 'checks').toLowerCase()} passed${withNotes}.`;
};

const sealedWords = (sealed: { passed: boolean } | null): string => {
  if (sealed === null) return 'There are no sealed circuits to check against.';
  return sealed.passed ? 'The sealed circuits are predicted within chance.' : 'The sealed circuits are not predicted within chance.';
};

const driftWords = (drift: Review['drift']): string => {
  if (drift.length === 0) return '';
  const beyond = drift.filter((b) => Math.abs(b.sigmas) > driftSigmas);
  const of = countWords(drift.length, '', '').trim().toLowerCase();
  if (beyond.length === 0) return drift.length === 1 ? 'The one block lies within the expected range.' : `None of ${of} blocks lies outside the expected range.`;
  return `${countWords(beyond.length, 'block', 'blocks')} of ${of} ${beyond.length === 1 ? 'lies' : 'lie'} outside the expected range.`;
};
