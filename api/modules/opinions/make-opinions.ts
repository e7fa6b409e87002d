import type { OpinionMethod } from '#shared/opinions/types.ts';
import { opinionMethods } from '#shared/opinions/types.ts';
import { SecondOpinion } from '#api/entities/second-opinion.ts';
import { SubmissionEstimate } from '#api/entities/submission-estimate.ts';
import { SubmissionFile } from '#api/entities/submission-file.ts';
import { Submission } from '#api/entities/submission.ts';
import type { Work } from '#api/lib/work.ts';
import { readSheetSeal } from '#api/modules/run-sheets/sheet-store.ts';
import { readBytes } from '#api/modules/submissions/file-store.ts';
import { givingWay } from './give-way.ts';

export interface OpinionOptions {
  signal?: AbortSignal;
  onProgress?: (stage: string, fraction: number) => void;
}

/** Quick routes first, so that a worker stopped in the long ones has little to do again. The second maximum needs the first. */
const rounds: readonly (readonly OpinionMethod[])[] = [['single-pass', 'ideal-spam', 'structured'], ['likelihood', 'likelihood-positive']];

/**
 * Makes the second opinions that are owed on an estimate. Safe to repeat at any point: everything is written at the end, and only
 * where it is still owed. Returns false where there was nothing to do.
 */
export const makeOpinions = async (work: Work, estimateId: string, { signal, onProgress }: OpinionOptions = {}): Promise<boolean> => {
  const em = work.em.fork();
  if (!(await em.findOne(SecondOpinion, { estimateId, state: { $ne: 'done' } }))) return false;
  const estimate = await em.findOneOrFail(SubmissionEstimate, { id: estimateId }, { exclude: ['sealedPoints', 'drift'] });
  const submission = await em.findOneOrFail(Submission, { id: estimate.submissionId });
  const file = await em.findOneOrFail(SubmissionFile, { submissionId: estimate.submissionId, round: estimate.round });
  const bytes = await readBytes(em, 'dataset', file.id);
  if (!bytes) throw new Error(`The file of ${submission.id} is not there.`);
  const seal = submission.runSheet && file.summary.runSheet ? await readSheetSeal(em, submission.runSheet.id) : null;
  const opinions = [];
  let officialSeconds = 0;
  for (const [i, methods] of rounds.entries()) {
    const made = await givingWay(em, signal, (both) => work.runInThread('second-opinions', { bytes, seal, official: estimate.summary.figures, methods }, {
      signal: both, onProgress: ({ stage, fraction }) => onProgress?.(stage, (i + fraction) / rounds.length),
    }));
    opinions.push(...made.opinions);
    officialSeconds = i === 0 ? made.officialSeconds : officialSeconds;
  }
  opinions.sort((a, b) => opinionMethods.indexOf(a.method) - opinionMethods.indexOf(b.method));
  const written = await em.nativeUpdate(SecondOpinion, { estimateId, state: { $ne: 'done' } }, { state: 'done', reason: null, opinions, officialSeconds, madeAt: work.clock.now() });
  return written > 0;
};

/** After the last attempt failed: the reason stands in place of the opinions. */
export const giveUpOpinions = async (work: Pick<Work, 'em'>, estimateId: string, reason: string): Promise<void> => {
  await work.em.fork().nativeUpdate(SecondOpinion, { estimateId, state: 'waiting' }, { state: 'failed', reason: reason.slice(0, 500) });
};
