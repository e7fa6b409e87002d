import { randomUUID } from 'node:crypto';
import type { Check } from '#shared/contracts/common.ts';
import { checksOfEstimate, estimateFailed, isBlocked } from '#shared/domain/checks.ts';
import { AppError } from '#shared/errors/app-error.ts';
import type { Seal } from '#shared/formats/types.ts';
import type { EstimateDatasetOutput, EstimateReport } from '#api/jobs/tasks/estimate-dataset.ts';
import type { CheckDatasetInput } from '#api/jobs/tasks/check-dataset.ts';
import { Submission } from '#api/entities/submission.ts';
import { SubmissionEstimate } from '#api/entities/submission-estimate.ts';
import { SubmissionFile } from '#api/entities/submission-file.ts';
import { runSql } from '#api/lib/run-sql.ts';
import { inTransaction, type Work } from '#api/lib/work.ts';
import { keepFactors, readFactors } from '#api/modules/run-sheets/factor-store.ts';
import { readSheet, readSheetSeal } from '#api/modules/run-sheets/sheet-store.ts';
import { oweOpinions } from '#api/modules/opinions/owe-opinions.ts';
import { readBytes } from './file-store.ts';
import { block, lockSubmission, pass } from './life-cycle.ts';
import { findDevice } from './place.ts';

export interface EstimateOptions {
  signal?: AbortSignal;
  onProgress?: (report: EstimateReport) => void;
}

/** The submission, if this round of it still waits for its estimate. A stale or repeated job finds nothing to do. */
const stillChecking = async (work: Work, id: string, round: number): Promise<Submission | null> =>
  work.em.fork().findOne(Submission, { id, round, state: 'checking' });

/** Loads what the checks compare the file with. The seal is opened here, in the worker, and goes no further than its threads. */
const sheetOf = async (work: Work, submission: Submission, file: SubmissionFile): Promise<CheckDatasetInput['sheet']> => {
  const named = file.summary.runSheet;
  if (!named) return null;
  const id = submission.runSheet?.id;
  if (id === undefined) return { id: named.id, why: `Your organisation has no drawn run sheet ${named.id}.` };
  const [sheet, seal] = [await readSheet(work.em, id), await readSheetSeal(work.em, id)];
  if (!sheet || !seal) throw new Error(`The drawn run sheet ${id} has no file or no seal.`);
  return { id, file: sheet, seal };
};

const deviceOf = async (work: Work, submission: Submission, file: SubmissionFile): Promise<CheckDatasetInput['device'] & { id: string | null }> => {
  const device = await findDevice(work, submission.organisation.id, file.summary.device);
  const { name, provider } = file.summary.device;
  if (!device) return { id: null, found: false, sentence: `Your organisation has no device ${JSON.stringify(name)} of provider ${JSON.stringify(provider)}. Register it under Devices, or correct the file, and send the file again.` };
  return { id: device.id, found: true, sentence: `${name}, ${provider}` };
};

/** Ends the checks of one round: an estimate or none, the list, and the move to "ready" or "blocked". */
const finish = (work: Work, id: string, round: number, checks: Check[], device: string | null, estimated: { id: string; output: EstimateDatasetOutput } | null): Promise<boolean> =>
  inTransaction(work, async (tx) => {
    const submission = await lockSubmission(tx, id);
    if (submission.state !== 'checking' || submission.round !== round) return false;
    if (estimated) {
      const { output } = estimated;
      await runSql(tx.em, `insert into submission_estimate (id, submission_id, round, method, result, result_sha256, replicates, replicates_sha256, replicate_count, summary, drift, sealed_points, made_at)
        values ($1, $2, $3, $4, $5, $6, $7, $8, $9, $10, $11, $12, $13)`, [
        estimated.id, id, round, output.method, output.result, output.resultSha256, output.replicates, output.replicatesSha256, output.summary.replicates,
        JSON.stringify(output.summary), JSON.stringify(output.drift), JSON.stringify(output.sealedPoints), tx.clock.now(),
      ]);
      submission.estimateId = estimated.id;
    }
    if (estimated && submission.runSheet) await keepFactors(tx.em, submission.runSheet.id, estimated.output.factors, tx.clock.now());
    tx.em.assign(submission, { checks, device, stage: null, progress: 1, replicatesDone: estimated?.output.summary.replicates ?? null });
    const stopped = checks.find((c) => c.blocking && c.status === 'failed');
    if (stopped) await block(tx, submission, `${stopped.title}: ${stopped.detail}`);
    else {
      await pass(tx, submission);
      if (estimated) await oweOpinions(tx, id, estimated.id);
    }
    return true;
  });

/**
 * Checks and estimates one round of a submission. Safe to repeat at any point: everything it keeps is written in one
 * transaction at its end, and the estimate is a pure function of file, seal and method. Returns false where there was nothing to do.
 */
export const runEstimate = async (work: Work, id: string, round: number, options: EstimateOptions = {}): Promise<boolean> => {
  const submission = await stillChecking(work, id, round);
  if (!submission) return false;
  const thread = options.signal ? { signal: options.signal } : {};
  const file = await work.em.fork().findOneOrFail(SubmissionFile, { id: submission.fileId });
  const bytes = await readBytes(work.em, 'dataset', submission.fileId);
  if (!bytes) throw new Error(`The file of ${id} is not there.`);
  const [sheet, device] = [await sheetOf(work, submission, file), await deviceOf(work, submission, file)];
  const known = await work.runInThread('check-dataset', { bytes, sheet, device: { found: device.found, sentence: device.sentence } }, thread);
  if (isBlocked(known)) return finish(work, id, round, known, device.id, null);
  await work.em.fork().nativeUpdate(Submission, { id, round, state: 'checking' }, { checks: known });
  const seal: Seal | null = sheet && 'seal' in sheet ? sheet.seal : null;
  try {
    const factors = sheet && 'seal' in sheet ? await readFactors(work.em, sheet.id, work.clock.now()) : [];
    const output = await work.runInThread('estimate-dataset', { bytes, seal, replicates: submission.replicates, factors }, { ...thread, ...(options.onProgress ? { onProgress: options.onProgress } : {}) });
    return await finish(work, id, round, [...known, ...checksOfEstimate(output.summary, output.drift)], device.id, { id: randomUUID(), output });
  } catch (fault) {
    if (!(fault instanceof AppError)) throw fault;
    return finish(work, id, round, [...known, estimateFailed(fault.message)], device.id, null);
  }
};

/** After the last attempt failed: the submission does not wait for ever, and its contributor is told. */
export const giveUpEstimate = async (work: Work, id: string, round: number): Promise<void> => {
  const submission = await stillChecking(work, id, round);
  if (!submission) return;
  const sentence = 'The registry could not make the estimate. The fault is ours and is noted; send the file again, or write to us in the thread.';
  await finish(work, id, round, [...submission.checks.filter((c) => c.status !== 'running' && c.status !== 'waiting'), estimateFailed(sentence)], submission.device?.id ?? null, null);
};

/** The estimate that a submission stands with now. */
export const currentEstimate = async (work: Pick<Work, 'em'>, submission: Submission): Promise<SubmissionEstimate | null> =>
  submission.estimateId ? work.em.findOne(SubmissionEstimate, { id: submission.estimateId }) : null;
