import type { Story } from '#api/demo/plan/story.ts';
import { curatorFor } from '#api/demo/plan/who.ts';
import type { Work } from '#api/lib/work.ts';
import { liftEmbargo } from '#api/modules/entries/freeze.ts';
import { claimReview, decide as decideReview } from '#api/modules/reviews/service.ts';
import { writeMessage } from '#api/modules/submissions/service.ts';
import type { Action } from '#shared/domain/rules.ts';
import { asPerson, asRegistry, type Moment } from './context.ts';
import { recordIn, submissionIn } from './contribute.ts';
import { reasonToAccept } from './words.ts';

const asCurator = async (moment: Moment, story: Story, action: Action): Promise<{ work: Work; id: string }> => {
  const { id, state, organisation } = await submissionIn(moment, story);
  return { work: await asPerson(moment, curatorFor(story).subject, action, { owner: organisation.id, state }), id };
};

export const claim = async (moment: Moment, story: Story): Promise<void> => {
  const { work, id } = await asCurator(moment, story, 'review.claim');
  await claimReview(work, id);
};

export const ask = async (moment: Moment, story: Story, body: string): Promise<void> => {
  const { work, id } = await asCurator(moment, story, 'submission.write-message');
  await writeMessage(work, id, body);
};

/** Decides; the reason of an acceptance is made from what the checks say. */
export const decide = async (moment: Moment, story: Story, outcome: 'accept' | 'return' | 'decline', reason?: string): Promise<void> => {
  const { work, id } = await asCurator(moment, story, 'review.decide');
  const { checks } = await submissionIn(moment, story);
  const { entry } = await decideReview(work, id, { outcome, reason: reason ?? reasonToAccept(story, checks), noInterest: true });
  if (entry) recordIn(moment, story).accession = entry.accession;
};

export const lift = async (moment: Moment, story: Story): Promise<void> => {
  if (!(await liftEmbargo(asRegistry(moment), recordIn(moment, story).submission ?? ''))) throw new Error(`The embargo of ${story.key} was not lifted.`);
};
