import { accessionOf, versionedAccessionOf } from '#shared/domain/ids.ts';
import { canonicalJson, sha256Hex } from '#shared/formats/canonical-json.ts';
import type { Decision } from '#api/entities/decision.ts';
import { EntryStateRow } from '#api/entities/entry-state.ts';
import { EntryVersion, type ReviewSummary } from '#api/entities/entry-version.ts';
import { SubmissionEstimate } from '#api/entities/submission-estimate.ts';
import { SubmissionFile } from '#api/entities/submission-file.ts';
import { SubmissionMessage } from '#api/entities/submission-message.ts';
import { Submission } from '#api/entities/submission.ts';
import { recordAudit } from '#api/lib/audit.ts';
import { runSql } from '#api/lib/run-sql.ts';
import { inTransaction, type Work } from '#api/lib/work.ts';
import { oweDoi } from '#api/modules/citations/owe-doi.ts';
import { logEvent } from '#api/modules/log/append.ts';
import { signRecord } from '#api/modules/log/record-signature.ts';
import { readSheetSeal } from '#api/modules/run-sheets/sheet-store.ts';
import { embargo, freeze, lift, lockSubmission, supersede, withdraw } from '#api/modules/submissions/life-cycle.ts';
import { presentMessage } from '#api/modules/submissions/presenter.ts';

const dayOf = (instant: Date): string => instant.toISOString().slice(0, 10);

/** Holds the counter to the end of the transaction: freezings follow one another, and a rolled-back one leaves no gap. */
const takeName = async (work: Work, correctionOf: string | null): Promise<{ accession: string; version: number }> => {
  const [counter] = await runSql<{ last: number }>(work.em, 'select last from accession_counter for update');
  if (!counter) throw new Error('The accession counter has no row.');
  if (correctionOf !== null) {
    const [row] = await runSql<{ version: number }>(work.em, 'select coalesce(max(version), 0) + 1 as version from entry_version where accession = $1', [correctionOf]);
    return { accession: correctionOf, version: row?.version ?? 1 };
  }
  await runSql(work.em, 'update accession_counter set last = last + 1');
  return { accession: accessionOf(counter.last + 1), version: 1 };
};

const reviewOf = async (work: Work, submission: Submission, decision: Decision): Promise<ReviewSummary> => {
  const messages = await work.em.find(SubmissionMessage, { submissionId: submission.id }, { orderBy: { at: 'asc', id: 'asc' } });
  return {
    reviewedAt: decision.at.toISOString(), note: decision.reason, round: submission.round, checks: submission.checks, messages: messages.map(presentMessage),
    access: submission.access ?? null, interests: submission.interests ?? null, notes: submission.notes ?? null,
  };
};

/** Copies the bytes inside the database, so that the entry stands by itself. */
const copyBytes = async (work: Work, name: { accession: string; version: number }, file: SubmissionFile, estimate: SubmissionEstimate): Promise<void> => {
  const key = [name.accession, name.version] as const;
  await runSql(work.em, `insert into entry_bytes (accession, version, kind, bytes, sha256) select $1, $2, 'dataset', bytes, bytes_sha256 from submission_file where id = $3`, [...key, file.id]);
  await runSql(work.em, `insert into entry_bytes (accession, version, kind, bytes, sha256) select $1, $2, 'result', result, result_sha256 from submission_estimate where id = $3`, [...key, estimate.id]);
  await runSql(work.em, `insert into entry_bytes (accession, version, kind, bytes, sha256) select $1, $2, 'replicates', replicates, replicates_sha256 from submission_estimate where id = $3`, [...key, estimate.id]);
};

const copySeal = async (work: Work, name: { accession: string; version: number }, runSheet: string): Promise<void> => {
  const seal = await readSheetSeal(work.em, runSheet);
  if (!seal) throw new Error(`The seal of ${runSheet} is not there.`);
  const bytes = new TextEncoder().encode(canonicalJson(seal));
  await runSql(work.em, `insert into entry_bytes (accession, version, kind, bytes, sha256) values ($1, $2, 'seal', $3, $4)`, [name.accession, name.version, bytes, sha256Hex(bytes)]);
};

const addState = (work: Work, name: { accession: string; version: number }, state: EntryStateRow['state'], reason: string | null = null, byId: string | null = null): void => {
  work.em.create(EntryStateRow, { ...name, state, at: work.clock.now(), reason, byId });
};

/** The versions before this one give up their place, in the moment in which it becomes public. */
const supersedeEarlier = async (work: Work, name: { accession: string; version: number }): Promise<void> => {
  const earlier = await work.em.find(EntryVersion, { accession: name.accession, version: { $lt: name.version } }, { fields: ['accession', 'version', 'submissionId'] });
  for (const { accession, version, submissionId } of earlier) {
    const submission = await lockSubmission(work, submissionId);
    if (submission.state !== 'frozen') continue;
    const reason = `superseded by ${versionedAccessionOf(name.accession, name.version)}`;
    addState(work, { accession, version }, 'superseded', reason);
    await supersede(work, submission, reason);
  }
};

/** A version whose embargo ended after a later version became public is superseded in the same moment. */
const supersedeIfLate = async (work: Work, submission: Submission, name: { accession: string; version: number }): Promise<void> => {
  const later = await work.em.find(EntryVersion, { accession: name.accession, version: { $gt: name.version } }, { fields: ['version', 'submissionId'], orderBy: { version: 'asc' } });
  for (const { version, submissionId } of later) {
    const { state } = await work.em.findOneOrFail(Submission, { id: submissionId });
    if (state !== 'frozen' && state !== 'superseded') continue;
    const reason = `superseded by ${versionedAccessionOf(name.accession, version)}`;
    addState(work, name, 'superseded', reason);
    return void (await supersede(work, submission, reason));
  }
};

/**
 * Freezes an accepted submission: accession, version, bytes, result, replicates, seal and review, all in the caller's
 * transaction. With an embargo date ahead the version is kept but not public until then.
 */
export const freezeSubmission = async (work: Work, submission: Submission, decision: Decision): Promise<{ accession: string; version: number }> => {
  const { em, clock } = work;
  const now = clock.now();
  if (!submission.estimateId || !submission.device) throw new Error(`${submission.id} was accepted without an estimate or a device.`);
  const file = await em.findOneOrFail(SubmissionFile, { id: submission.fileId });
  const estimate = await em.findOneOrFail(SubmissionEstimate, { id: submission.estimateId });
  const name = await takeName(work, submission.correctionOf ?? null);
  if (name.version === 1) {
    await runSql(em, 'insert into entry (accession, organisation_id, device_id, gate_class, register, created_at) values ($1, $2, $3, $4, $5, $6)', [
      name.accession, submission.organisation.id, submission.device.id, submission.gateClass, JSON.stringify(submission.register), now,
    ]);
  }
  const runSheetId = submission.runSheet?.id ?? null;
  em.create(EntryVersion, {
    ...name, submissionId: submission.id, decisionId: decision.id, organisation: submission.organisation, device: submission.device, gateClass: submission.gateClass, register: submission.register, runSheetId,
    title: submission.title, method: estimate.method, replicates: estimate.replicateCount, fileName: file.name, fileSize: file.size, contentId: file.contentId, bytesSha256: file.bytesSha256,
    resultSha256: estimate.resultSha256, replicatesSha256: estimate.replicatesSha256, endedAt: new Date(file.summary.endedAt), dataset: file.summary, summary: estimate.summary,
    sealedPoints: estimate.sealedPoints, review: await reviewOf(work, submission, decision), sealed: runSheetId !== null, acceptedAt: now, embargoUntil: submission.embargoUntil ?? null, demo: submission.demo,
  });
  await em.flush();
  await copyBytes(work, name, file, estimate);
  if (runSheetId !== null) await copySeal(work, name, runSheetId);
  await signRecord(work, name);
  em.assign(submission, name);
  const kept = Boolean(submission.embargoUntil && submission.embargoUntil > dayOf(now));
  addState(work, name, kept ? 'embargoed' : 'frozen');
  await (kept ? embargo : freeze)(work, submission);
  if (!kept) {
    await logEvent(work, 'frozen', name);
    await oweDoi(work, name);
    await supersedeEarlier(work, name);
  }
  recordAudit(em, { at: now, action: kept ? 'entry.embargo' : 'entry.freeze', subjectType: 'entry', subjectId: versionedAccessionOf(name.accession, name.version), organisationId: submission.organisation.id, requestId: work.requestId ?? null, detail: { submission: submission.id, contentId: file.contentId, resultSha256: estimate.resultSha256 } });
  return name;
};

/** Makes one version public whose embargo has ended. Returns false where that is done already, or not due. */
export const liftEmbargo = (work: Work, id: string): Promise<boolean> =>
  inTransaction(work, async (tx) => {
    const submission = await lockSubmission(tx, id);
    const { accession, version, embargoUntil } = submission;
    if (submission.state !== 'embargoed' || !accession || !version || !embargoUntil || embargoUntil > dayOf(tx.clock.now())) return false;
    await runSql(tx.em, 'select last from accession_counter for update');
    addState(tx, { accession, version }, 'frozen');
    await lift(tx, submission);
    await logEvent(tx, 'frozen', { accession, version });
    await oweDoi(tx, { accession, version });
    await supersedeEarlier(tx, { accession, version });
    await supersedeIfLate(tx, submission, { accession, version });
    recordAudit(tx.em, { at: tx.clock.now(), action: 'entry.lift', subjectType: 'entry', subjectId: versionedAccessionOf(accession, version), organisationId: submission.organisation.id });
    return true;
  });

/** Makes public every version whose date has come; each in a transaction of its own. Returns how many. */
export const liftEmbargoes = async (work: Work): Promise<number> => {
  const due = await work.em.fork().find(Submission, { state: 'embargoed', embargoUntil: { $lte: dayOf(work.clock.now()) } }, { fields: ['id'], orderBy: { embargoUntil: 'asc', id: 'asc' } });
  let lifted = 0;
  for (const { id } of due) if (await liftEmbargo(work, id)) lifted += 1;
  return lifted;
};

/** Takes a public version out of use: the page, the result and the proof stay, the data does not. The caller has two curators' word. */
export const markWithdrawn = async (work: Work, submission: Submission, { accession, version }: { accession: string; version: number }, reason: string, by: string): Promise<void> => {
  addState(work, { accession, version }, 'withdrawn', reason, by);
  await withdraw(work, submission, reason);
  await logEvent(work, 'withdrawn', { accession, version });
};
