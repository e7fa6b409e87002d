import { SecondOpinion } from '#api/entities/second-opinion.ts';
import type { Work } from '#api/lib/work.ts';

/** Opinions come after every estimate that waits. */
const priority = -10;

/** Second opinions are owed on an estimate from the moment its submission is ready. In the caller's transaction, like the job. */
export const oweOpinions = async (work: Work, submission: string, estimate: string): Promise<void> => {
  await work.em.upsert(SecondOpinion, { estimateId: estimate, submissionId: submission, state: 'waiting', reason: null, opinions: null, officialSeconds: null, queuedAt: work.clock.now(), madeAt: null }, { onConflictAction: 'ignore' });
  await work.queue.send('opinions', { submission, estimate }, { em: work.em, priority, singletonKey: estimate });
};
