import { LockMode } from '@mikro-orm/core';
import { mayMove, moves, stateWords, type Move } from '#shared/domain/life-cycle.ts';
import { AppError } from '#shared/errors/app-error.ts';
import { SubmissionMove } from '#api/entities/submission-move.ts';
import { Submission } from '#api/entities/submission.ts';
import { actorOf } from '#api/lib/actor.ts';
import { recordAudit } from '#api/lib/audit.ts';
import type { Work } from '#api/lib/work.ts';
import { oweMail } from './mail.ts';

/** Takes the submission's row for the rest of the transaction, so that two moves never start from one state. */
export const lockSubmission = async ({ em }: Work, id: string): Promise<Submission> => {
  const submission = await em.findOne(Submission, { id }, { lockMode: LockMode.PESSIMISTIC_WRITE, refresh: true });
  if (!submission) throw new AppError('not-found', `There is no submission ${id}.`);
  return submission;
};

const verbs: Readonly<Record<Move, string>> = {
  receive: 'received', check: 'checked', block: 'blocked', pass: 'passed', replace: 'given a new file', send: 'sent to review', return: 'returned', decline: 'declined',
  accept: 'accepted', embargo: 'put under embargo', freeze: 'frozen', lift: 'released from its embargo', supersede: 'superseded', withdraw: 'withdrawn', cancel: 'cancelled',
};

/**
 * One step along the life of a submission: the rule of `moves`, the row of the history, the audit event and the
 * mail it owes, all in the caller's transaction. The submission must be locked (a new one need not).
 */
const step = async (work: Work, submission: Submission, move: Move, { from = submission.state, reason = null, byRegistry = false }: { from?: Submission['state'] | null; reason?: string | null; byRegistry?: boolean } = {}): Promise<void> => {
  if (!mayMove(move, from)) throw new AppError('wrong-state', `${submission.id} cannot be ${verbs[move]} now: its state is "${from ? stateWords[from].toLowerCase() : 'none'}".`);
  const at = work.clock.now();
  const actor = byRegistry || moves[move].by === 'registry' ? null : await actorOf(work);
  submission.state = moves[move].to;
  submission.changedAt = at;
  work.em.create(SubmissionMove, { submissionId: submission.id, move, state: submission.state, at, byName: actor?.name ?? null, byId: actor?.userId ?? null, reason });
  recordAudit(work.em, {
    at,
    action: `submission.${move}`,
    subjectType: 'submission',
    subjectId: submission.id,
    ...(actor && work.caller ? { caller: work.caller } : {}),
    organisationId: submission.organisation.id,
    requestId: work.requestId ?? null,
    detail: { state: submission.state, round: submission.round, ...(reason === null ? {} : { reason }) },
  });
  await oweMail(work, submission, move, reason);
};

export const receive = (work: Work, s: Submission) => step(work, s, 'receive', { from: null });
export const beginChecks = (work: Work, s: Submission) => step(work, s, 'check');
export const block = (work: Work, s: Submission, reason: string) => step(work, s, 'block', { reason });
export const pass = (work: Work, s: Submission) => step(work, s, 'pass');
export const replace = (work: Work, s: Submission) => step(work, s, 'replace');
export const send = (work: Work, s: Submission) => step(work, s, 'send');
export const returnToContributor = (work: Work, s: Submission, reason: string) => step(work, s, 'return', { reason });
export const decline = (work: Work, s: Submission, reason: string) => step(work, s, 'decline', { reason });
export const accept = (work: Work, s: Submission, reason: string) => step(work, s, 'accept', { reason });
export const embargo = (work: Work, s: Submission) => step(work, s, 'embargo');
export const freeze = (work: Work, s: Submission) => step(work, s, 'freeze');
export const lift = (work: Work, s: Submission) => step(work, s, 'lift');
export const supersede = (work: Work, s: Submission, reason: string) => step(work, s, 'supersede', { reason });
export const withdraw = (work: Work, s: Submission, reason: string) => step(work, s, 'withdraw', { reason });
export const cancel = (work: Work, s: Submission) => step(work, s, 'cancel');
