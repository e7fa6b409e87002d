import type { Submission } from '#shared/contracts/submissions.ts';
import { formatCount } from '#shared/domain/format.ts';

type Running = Pick<Submission, 'state' | 'stage' | 'replicatesDone' | 'replicates'>;

const stages: Readonly<Record<string, string>> = {
  design: 'Writing out the design.', inverse: 'Inverting the design.', passes: 'Estimating, in eight passes.', figures: 'Reading the figures.',
};

/** What the registry is doing with a dataset just now, in one sentence. */
export const progressWords = ({ state, stage, replicatesDone, replicates }: Running): string => {
  if (state === 'draft') return 'Waiting for its turn.';
  if (state === 'accepted') return 'Accepted; the registry is freezing it.';
  if (stage === 'replicates') return `${formatCount(replicatesDone ?? 0)} of ${formatCount(replicates)} replicates.`;
  return stage === null ? 'Checking the file.' : stages[stage] ?? `${stage.charAt(0).toUpperCase()}${stage.slice(1)}.`;
};

/** What a screen reader is told: only when the stage changes or another quarter of the replicates is done, not twice a second. */
export const announcement = (running: Running): string => {
  if (running.stage !== 'replicates' || running.replicates === 0) return progressWords(running);
  const quarters = Math.floor((4 * (running.replicatesDone ?? 0)) / running.replicates);
  return quarters === 0 ? 'Bootstrap running.' : `Bootstrap, ${['', 'a quarter', 'half', 'three quarters', 'all'][quarters] ?? 'all'} done.`;
};
