import { randomUUID } from 'node:crypto';
import { DriverException } from '@mikro-orm/core';
import type { WithdrawalAnswered, WithdrawalAsked } from '#shared/contracts/withdrawals.ts';
import { versionedAccessionOf } from '#shared/domain/ids.ts';
import { AppError } from '#shared/errors/app-error.ts';
import { EntryVersion } from '#api/entities/entry-version.ts';
import type { Submission } from '#api/entities/submission.ts';
import { requireActor, type Actor } from '#api/lib/actor.ts';
import { recordAudit } from '#api/lib/audit.ts';
import { authorise } from '#api/lib/authorise.ts';
import { runSql } from '#api/lib/run-sql.ts';
import { inTransaction, type Work } from '#api/lib/work.ts';
import { markWithdrawn } from '#api/modules/entries/freeze.ts';
import { lockSubmission } from '#api/modules/submissions/life-cycle.ts';
import { curatorsWithoutInterest, writeMail } from '#api/modules/submissions/mail.ts';
import { findWithdrawal, type WithdrawalRow } from './load.ts';

interface Name {
  accession: string;
  version: number;
}

/** Locks the version's submission and judges the caller on it: services are called without routes too. */
const open = async (work: Work, { accession, version }: Name, action: 'withdrawal.ask' | 'withdrawal.answer'): Promise<{ submission: Submission; actor: Actor }> => {
  const row = await work.em.findOne(EntryVersion, { accession, version }, { fields: ['submissionId'] });
  if (!row) throw new AppError('not-found', `There is no public entry ${JSON.stringify(versionedAccessionOf(accession, version))}.`);
  const submission = await lockSubmission(work, row.submissionId);
  const actor = await requireActor(work);
  if (work.caller) authorise(action, work.caller, { owner: submission.organisation.id, state: submission.state });
  return { submission, actor };
};

/** The database's second line, in words. */
const explain = (fault: unknown): unknown => {
  if (!(fault instanceof DriverException) && !(fault instanceof Error && 'code' in fault)) return fault;
  const { code, message } = fault as Error & { code?: string };
  if (code === 'EB002') return new AppError('not-allowed', message.includes('two curators') ? 'A withdrawal takes two curators; you asked for this one yourself.' : 'This is not open to you. You belong, or belonged in the last 12 months, to the organisation it comes from, or you are no curator.');
  if (code === 'EB003' && message.includes('waits already')) return new AppError('wrong-state', 'A withdrawal of this version waits for its answer already.');
  return fault;
};

const audit = (work: Work, action: string, name: Name, submission: Submission, detail: Record<string, unknown>): void => {
  recordAudit(work.em, { at: work.clock.now(), action, subjectType: 'entry', subjectId: versionedAccessionOf(name.accession, name.version), ...(work.caller ? { caller: work.caller } : {}), organisationId: submission.organisation.id, requestId: work.requestId ?? null, detail });
};

/** One curator asks that a version be withdrawn; the other curators are written to. */
export const askWithdrawal = (work: Work, name: Name, given: WithdrawalAsked): Promise<string> =>
  inTransaction(work, async (tx) => {
    const { submission, actor } = await open(tx, name, 'withdrawal.ask');
    const id = randomUUID();
    await runSql(tx.em, 'insert into withdrawal (id, accession, version, reason, asked_by_id, asked_at) values ($1, $2, $3, $4, $5, $6)', [id, name.accession, name.version, given.reason, actor.userId, tx.clock.now()]);
    audit(tx, 'withdrawal.ask', name, submission, { withdrawal: id });
    const called = versionedAccessionOf(name.accession, name.version);
    await writeMail(tx, await curatorsWithoutInterest(tx, submission.organisation.id), { subject: `A withdrawal of ${called} waits for a second curator`, body: `${actor.name} asks that ${called}, "${submission.title}", be withdrawn:\n\n${given.reason}\n\nIt is withdrawn once another curator confirms it.`, topicId: submission.id });
    return id;
  }).catch((fault: unknown) => Promise.reject(explain(fault)));

/** Another curator confirms, and the version is withdrawn in the same transaction; or either of them drops it. */
export const answerWithdrawal = (work: Work, id: string, given: WithdrawalAnswered): Promise<WithdrawalRow> =>
  inTransaction(work, async (tx) => {
    const asked = await findWithdrawal(tx.em, id);
    const { submission, actor } = await open(tx, asked, 'withdrawal.answer');
    const now = await findWithdrawal(tx.em, id);
    if (now.answer) throw new AppError('wrong-state', `This withdrawal was ${now.answer} on ${now.answeredAt?.toISOString().slice(0, 10)}.`);
    const answer = given.answer === 'confirm' ? 'confirmed' : 'dropped';
    await runSql(tx.em, 'insert into withdrawal_answer (withdrawal_id, answer, note, answered_by_id, answered_at) values ($1, $2, $3, $4, $5)', [id, answer, given.answer === 'drop' ? given.note : '', actor.userId, tx.clock.now()]);
    audit(tx, `withdrawal.${given.answer}`, asked, submission, { withdrawal: id });
    if (given.answer === 'confirm') await markWithdrawn(tx, submission, asked, asked.reason, actor.userId);
    return findWithdrawal(tx.em, id);
  }).catch((fault: unknown) => Promise.reject(explain(fault)));
