import type { EntityManager } from '@mikro-orm/postgresql';
import type { Review, ReviewItem } from '#shared/contracts/reviews.ts';
import { headlineOf } from '#shared/domain/board-figures.ts';
import { judge } from '#shared/domain/rules.ts';
import { SubmissionEstimate } from '#api/entities/submission-estimate.ts';
import type { Submission } from '#api/entities/submission.ts';
import type { Caller } from '#api/lib/caller.ts';
import { presentDevice } from '#api/modules/devices/presenter.ts';
import { withRows } from '#api/modules/entries/load.ts';
import { versionsWith } from '#api/modules/entries/public-entries.ts';
import { presentClassRef } from '#api/modules/gate-classes/presenter.ts';
import { presentSubmission } from '#api/modules/submissions/presenter.ts';
import { claimantOf } from './service.ts';

const claimOf = (s: Submission, caller: Caller, now: Date): { claimedBy: string | null; claimedByMe: boolean; taken: boolean } => {
  const claimant = claimantOf(s, now);
  const mine = claimant !== null && claimant === caller.user?.id;
  return { claimedBy: claimant === null ? null : (s.claimedBy?.unwrap().name ?? null), claimedByMe: mine, taken: claimant !== null && !mine };
};

export const presentReviewItem = (s: Submission, caller: Caller, now: Date): ReviewItem => {
  const { claimedBy, claimedByMe } = claimOf(s, caller, now);
  return {
    id: s.id,
    title: s.title,
    device: s.device ? presentDevice(s.device.unwrap()) : null,
    gateClass: presentClassRef(s.gateClass),
    organisation: s.organisation.unwrap().name,
    round: s.round,
    sentAt: (s.sentAt ?? s.changedAt).toISOString(),
    passed: s.checks.filter((c) => c.status === 'passed').length,
    notes: s.checks.filter((c) => c.status === 'note').length,
    claimedBy,
    claimedByMe,
  };
};

/** Earlier public results of the same device, register and class, oldest first. */
const earlierOf = async (em: EntityManager, s: Submission): Promise<Review['earlier']> => {
  if (!s.device) return [];
  const rows = await withRows(em, await versionsWith(em, 'device_id', s.device.id));
  const same = rows.filter((v) => v.state !== 'withdrawn' && v.row.gateClass === s.gateClass && JSON.stringify(v.row.register) === JSON.stringify(s.register) && v.row.submissionId !== s.id);
  return same.map((v) => ({ accession: v.accession, version: v.version, frozenAt: v.frozenAt.toISOString(), headline: headlineOf(v.row.summary.figures, v.row.register.length) }));
};

/** What a curator sees of a submission. It comes from `findSubmission`. */
export const presentReview = async (em: EntityManager, s: Submission, caller: Caller, now: Date): Promise<Review> => {
  const { claimedBy, claimedByMe, taken } = claimOf(s, caller, now);
  const estimate = s.estimateId ? await em.findOne(SubmissionEstimate, { id: s.estimateId }, { fields: ['drift'] }) : null;
  const thing = { owner: s.organisation.id, state: s.state };
  return {
    submission: await presentSubmission(em, s, caller.asker),
    claimedBy,
    claimedByMe,
    drift: estimate?.drift ?? [],
    earlier: await earlierOf(em, s),
    may: { claim: !taken && !claimedByMe && judge('review.claim', caller.asker, thing).allowed, decide: !taken && judge('review.decide', caller.asker, thing).allowed },
  };
};
