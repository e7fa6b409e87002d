import type { Check } from '#shared/contracts/common.ts';
import type { Review } from '#shared/contracts/reviews.ts';
import { expectedRange } from '#web/charts/drift-data.ts';
import { capitalise, countInWords, plural } from '#shared/domain/format.ts';

const count = (n: number, one: string): string => `${countInWords(n)} ${plural(n, one)}`;

/** The sentences over a case, made from its checks, its sealed check and its blocks. */
export const openingWords = ({ submission, drift }: Pick<Review, 'drift'> & { submission: Pick<Review['submission'], 'checks' | 'result'> }): string =>
  [checkWords(submission.checks), sealedWords(submission.result?.sealedCheck ?? null), driftWords(drift)].filter((words) => words !== '').join(' ');

const checkWords = (checks: readonly Check[]): string => {
  const failed = checks.filter((c) => c.status === 'failed').length;
  const notes = checks.filter((c) => c.status === 'note').length;
  const passed = checks.length - failed;
  const withNotes = notes === 0 ? '' : `, with ${count(notes, 'note')}`;
  if (failed > 0) return `${capitalise(count(failed, 'check'))} of ${countInWords(checks.length)} failed${withNotes}.`;
  return `All ${count(passed, 'check')} passed${withNotes}.`;
};

const sealedWords = (sealed: { passed: boolean } | null): string => {
  if (sealed === null) return 'There are no sealed circuits to check against.';
  return sealed.passed ? 'The sealed circuits are predicted within chance.' : 'The sealed circuits are not predicted within chance.';
};

const driftWords = (drift: Review['drift']): string => {
  if (drift.length === 0) return '';
  const beyond = drift.filter((b) => Math.abs(b.sigmas) > expectedRange);
  const of = countInWords(drift.length);
  if (beyond.length === 0) return drift.length === 1 ? 'The one block lies within the expected range.' : `None of ${of} blocks lies outside the expected range.`;
  return `${capitalise(count(beyond.length, 'block'))} of ${of} ${beyond.length === 1 ? 'lies' : 'lie'} outside the expected range.`;
};
