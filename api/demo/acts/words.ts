import type { Check } from '#shared/contracts/common.ts';
import { createGenerator } from '#api/demo/simulator/generator.ts';
import type { Story } from '#api/demo/plan/story.ts';

const choose = (stream: { next(): number }, sentences: readonly string[]): string => sentences[Math.floor(stream.next() * sentences.length)] ?? '';

const noted = (checks: readonly Check[], id: string): boolean => checks.some((c) => c.id === id && c.status === 'note');

const onNotes = (checks: readonly Check[], stream: { next(): number }): string[] => {
  const sentences: string[] = [];
  if (noted(checks, 'run-sheet')) sentences.push('The circuits are the contributor’s own, so the entry is never ranked.');
  if (noted(checks, 'design')) sentences.push('The gates do not determine every figure: what they determine is printed, the rest is named.');
  if (noted(checks, 'settled')) sentences.push('The estimate did not settle: the gate errors are beyond what its passes can follow, so the entry is not ranked.');
  if (noted(checks, 'sealed') && !noted(checks, 'run-sheet')) sentences.push('The sealed circuits were not predicted within the 99 % range, so the entry is not ranked.');
  if (noted(checks, 'misfit') && noted(checks, 'design')) sentences.push('The counts do not fit the first-order model, as happens with such gates; predictions stand without intervals.');
  else if (noted(checks, 'misfit')) sentences.push('The counts do not fit one set of gates; the figures are an average and the note stays on the page.');
  else if (noted(checks, 'drift')) sentences.push('One block stands apart from the others; the note stays on the page.');
  if (sentences.length > 0) return sentences;
  return [choose(stream, ['Every check passed.', 'The sealed circuits were predicted within the 99 % range, and the counts fit the estimate.', 'The counts fit the estimate in every block.', 'The circuits agree with the run sheet one by one, and every check passed.'])];
};

/** The reason of an acceptance: what the checks noted, or that they noted nothing, and the state of the record. */
export const reasonToAccept = (story: Story, checks: readonly Check[]): string => {
  const stream = createGenerator(`reason:${story.key}`);
  const last = story.exchange === undefined
    ? choose(stream, ['The record is complete.', 'Notes, run sheet and file agree.', 'Access and interests are told.', 'I have no open question.', 'Provenance is told in full.'])
    : choose(stream, ['My question was answered in the thread.', 'The thread answers what the file left open.', 'With the answer in the thread the record is complete.']);
  const correction = story.corrects === undefined ? [] : ['It takes the place of the version before it.'];
  return [...onNotes(checks, stream), ...correction, last].join(' ');
};
