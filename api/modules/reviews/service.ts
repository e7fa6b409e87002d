import { DriverException } from '@mikro-orm/core';
import type { ReviewDecision } from '#shared/contracts/reviews.ts';
import { AppError } from '#shared/errors/app-error.ts';
import { Decision } from '#api/entities/decision.ts';
import type { Submission } from '#api/entities/submission.ts';
import { User } from '#api/entities/user.ts';
import { requireActor, type Actor } from '#api/lib/actor.ts';
import { authorise } from '#api/lib/authorise.ts';
import { recordAudit } from '#api/lib/audit.ts';
import { inTransaction, type Work } from '#api/lib/work.ts';
import { freezeSubmission } from '#api/modules/entries/freeze.ts';
import { accept, decline, lockSubmission, returnToContributor } from '#api/modules/submissions/life-cycle.ts';

/** A claim lapses after so many days, so that nothing waits for ever for a curator who is away. */
const claimDays = 14;

export const claimantOf = (s: Submission, now: Date): string | null =>
  s.claimedBy && s.claimedAt && now.getTime() - s.claimedAt.getTime() < claimDays * 86_400_000 ? s.claimedBy.id : null;

/** Locks the submission and judges the caller on it once more: services are called without routes too. */
const openReview = async (work: Work, id: string, action: 'review.claim' | 'review.release' | 'review.decide'): Promise<{ submission: Submission; actor: Actor }> => {
  const submission = await lockSubmission(work, id);
  const actor = await requireActor(work);
  if (work.caller) authorise(action, work.caller, { owner: submission.organisation.id, state: submission.state });
  const claimant = claimantOf(submission, work.clock.now());
  if (claimant !== null && claimant !== actor.userId) throw new AppError('wrong-state', `${id} is in the hands of another curator since ${submission.claimedAt?.toISOString().slice(0, 10)}.`);
  return { submission, actor };
};

const audit = (work: Work, action: string, submission: Submission, detail: Record<string, unknown> = {}): void => {
  recordAudit(work.em, { at: work.clock.now(), action, subjectType: 'submission', subjectId: submission.id, ...(work.caller ? { caller: work.caller } : {}), organisationId: submission.organisation.id, requestId: work.requestId ?? null, detail });
};

/** Takes a submission for review; another curator who has taken it is in the way. */
export const claimReview = (work: Work, id: string): Promise<Submission> =>
  inTransaction(work, async (tx) => {
    const { submission, actor } = await openReview(tx, id, 'review.claim');
    tx.em.assign(submission, { claimedBy: actor.userId, claimedAt: tx.clock.now() });
    audit(tx, 'review.claim', submission);
    return submission;
  });

export const releaseReview = (work: Work, id: string): Promise<Submission> =>
  inTransaction(work, async (tx) => {
    const { submission } = await openReview(tx, id, 'review.release');
    tx.em.assign(submission, { claimedBy: null, claimedAt: null });
    audit(tx, 'review.release', submission);
    return submission;
  });

const outcomes = { accept: 'accepted', return: 'returned', decline: 'declined' } as const;

/** The database's second line: its triggers refuse what the rule table should have refused before. */
const explainTrigger = (fault: unknown): unknown =>
  fault instanceof DriverException && fault.code === 'EB002' ? new AppError('not-allowed', 'This is not open to you. You belong, or belonged in the last 12 months, to the organisation it comes from, or you are no curator.') : fault;

export interface Decided {
  submission: Submission;
  entry: { accession: string; version: number } | null;
}

/** Decides on a submission in review. Accepting freezes it, or puts it under its embargo, in the same transaction. */
export const decide = (work: Work, id: string, given: ReviewDecision): Promise<Decided> =>
  inTransaction(work, async (tx) => {
    const { submission, actor } = await openReview(tx, id, 'review.decide');
    tx.em.assign(submission, { claimedBy: actor.userId, claimedAt: submission.claimedAt ?? tx.clock.now() });
    const decision = tx.em.create(Decision, { submissionId: id, round: submission.round, outcome: outcomes[given.outcome], reason: given.reason, curator: tx.em.getReference(User, actor.userId), at: tx.clock.now() });
    audit(tx, 'review.decide', submission, { outcome: given.outcome, round: submission.round });
    if (given.outcome === 'return') await returnToContributor(tx, submission, given.reason);
    else if (given.outcome === 'decline') await decline(tx, submission, given.reason);
    else await accept(tx, submission, given.reason);
    await tx.em.flush();
    const entry = given.outcome === 'accept' ? await freezeSubmission(tx, submission, decision) : null;
    return { submission, entry };
  }).catch((fault: unknown) => Promise.reject(explainTrigger(fault)));
