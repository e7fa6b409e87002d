import type { EntityManager } from '@mikro-orm/postgresql';
import type { SubmissionRecord } from '#shared/contracts/submissions.ts';
import { submissionPattern } from '#shared/domain/ids.ts';
import { AppError } from '#shared/errors/app-error.ts';
import { Submission } from '#api/entities/submission.ts';
import { SubmissionMessage } from '#api/entities/submission-message.ts';
import { User } from '#api/entities/user.ts';
import { requireActor } from '#api/lib/actor.ts';
import { recordAudit } from '#api/lib/audit.ts';
import { inTransaction, type Work } from '#api/lib/work.ts';
import { cancel, lockSubmission, send } from './life-cycle.ts';
import { writeMail } from './mail.ts';

/** An embargo may last so many days from the moment it is asked for. */
export const longestEmbargoDays = 180;

export const findSubmission = async (em: EntityManager, id: string): Promise<Submission> => {
  const found = submissionPattern.test(id) ? await em.findOne(Submission, { id }, { populate: ['organisation', 'device.organisation', 'runSheet', 'claimedBy'] }) : null;
  if (!found) throw new AppError('not-found', `There is no submission ${JSON.stringify(id.slice(0, 40))}.`);
  return found;
};

/** Complete when access and interests are told. */
export const isRecordComplete = (s: Pick<Submission, 'access' | 'interests'>): boolean => Boolean(s.access?.trim()) && Boolean(s.interests?.trim());

const dayOf = (instant: Date): string => instant.toISOString().slice(0, 10);

const checkEmbargo = (date: string, now: Date): void => {
  const latest = dayOf(new Date(now.getTime() + longestEmbargoDays * 86_400_000));
  if (date > dayOf(now) && date <= latest) return;
  const message = `The embargo must end after today and at most ${longestEmbargoDays} days ahead, by ${latest}. Given: "${date}".`;
  throw new AppError('invalid-request', `/embargoUntil: ${message}`, [{ pointer: '/embargoUntil', message }]);
};

/** Sets fields of the record beside the file; fields that are not named stay. */
export const changeRecord = (work: Work, id: string, patch: Partial<SubmissionRecord>): Promise<Submission> =>
  inTransaction(work, async (tx) => {
    const submission = await lockSubmission(tx, id);
    if (!['draft', 'checking', 'blocked', 'ready', 'returned'].includes(submission.state)) throw new AppError('wrong-state', `The record of ${id} is closed: its state is "${submission.state}".`);
    if (patch.embargoUntil) checkEmbargo(patch.embargoUntil, tx.clock.now());
    const given = Object.fromEntries(Object.entries(patch).filter(([, value]) => value !== undefined).map(([key, value]) => [key, typeof value === 'string' ? value.trim() || null : value]));
    tx.em.assign(submission, { ...given, changedAt: tx.clock.now() });
    recordAudit(tx.em, { at: tx.clock.now(), action: 'submission.edit', subjectType: 'submission', subjectId: id, ...(tx.caller ? { caller: tx.caller } : {}), organisationId: submission.organisation.id, requestId: tx.requestId ?? null, detail: { fields: Object.keys(given) } });
    return submission;
  });

/** Sends a ready submission with a complete record to review. */
export const sendToReview = (work: Work, id: string): Promise<Submission> =>
  inTransaction(work, async (tx) => {
    const submission = await lockSubmission(tx, id);
    if (submission.state === 'ready' && !isRecordComplete(submission)) {
      const missing = [['access', 'How and by whom the device was reached is missing.'], ['interests', 'The interests of the contributors are missing; "none" is an answer.']] as const;
      const details = missing.filter(([key]) => !submission[key]?.trim()).map(([key, message]) => ({ pointer: `/${key}`, message }));
      throw new AppError('invalid-request', `The record is not complete. ${details.map((d) => d.message).join(' ')}`, details);
    }
    if (submission.embargoUntil) checkEmbargo(submission.embargoUntil, tx.clock.now());
    await send(tx, submission);
    submission.sentAt = tx.clock.now();
    return submission;
  });

export const cancelSubmission = (work: Work, id: string): Promise<Submission> =>
  inTransaction(work, async (tx) => {
    const submission = await lockSubmission(tx, id);
    await cancel(tx, submission);
    return submission;
  });

/** Adds to the thread. A contributor's message is mailed to the curator who has claimed it, a curator's to the contributor. */
export const writeMessage = (work: Work, id: string, body: string): Promise<SubmissionMessage> =>
  inTransaction(work, async (tx) => {
    const submission = await lockSubmission(tx, id);
    const actor = await requireActor(tx);
    const own = tx.caller?.asker.contributorOf.includes(submission.organisation.id) ?? false;
    const organisation = tx.caller?.organisations.find((o) => (own ? o.id === submission.organisation.id : true));
    const message = tx.em.create(SubmissionMessage, { submissionId: id, role: own ? 'contributor' : 'curator', authorId: actor.userId, authorName: actor.name, organisationName: own ? (organisation?.name ?? null) : null, at: tx.clock.now(), body });
    const reader = own ? submission.claimedBy?.id : submission.createdBy.id;
    const user = reader === undefined || reader === actor.userId ? null : await tx.em.findOne(User, { id: reader, disabledAt: null });
    if (user) await writeMail(tx, [user.email], { subject: `A message about ${id}`, body: `${actor.name} wrote about "${submission.title}":\n\n${body}`, topicId: id });
    recordAudit(tx.em, { at: tx.clock.now(), action: 'submission.write-message', subjectType: 'submission', subjectId: id, ...(tx.caller ? { caller: tx.caller } : {}), organisationId: submission.organisation.id, requestId: tx.requestId ?? null });
    await tx.em.flush();
    return message;
  });
