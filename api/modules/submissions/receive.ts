import { submissionIdOf } from '#shared/domain/ids.ts';
import { AppError } from '#shared/errors/app-error.ts';
import { Organisation } from '#api/entities/organisation.ts';
import { Submission } from '#api/entities/submission.ts';
import { requireActor } from '#api/lib/actor.ts';
import { nextNumber } from '#api/lib/names.ts';
import { inTransaction, type Work } from '#api/lib/work.ts';
import type { Inspected } from './inspection.ts';
import { beginChecks, lockSubmission, receive, replace } from './life-cycle.ts';
import { explainUnique, placeDataset } from './place.ts';
import { storeFile } from './store-file.ts';

export const usualReplicates = 2000;

export interface DatasetFile {
  /** The file unpacked. */
  bytes: Uint8Array;
  name: string;
  /** What `inspectDataset` found, where it has been called already. */
  seen?: Inspected;
}

export interface ReceiveInput extends DatasetFile {
  /** Id of the organisation that submits. */
  organisation: string;
  /** Accession of an earlier entry that this dataset corrects. */
  correctionOf?: string | null;
  replicates?: number;
  /** Made for the demo registry, and marked so. */
  demo?: boolean;
}

/** Reads the whole file in a thread; throws with a pointer for every fault, before anything is stored. */
export const inspectDataset = async (work: Work, bytes: Uint8Array): Promise<Inspected> => {
  const inspection = await work.runInThread('inspect-dataset', { bytes });
  if (!inspection.ok) throw new AppError(inspection.code, inspection.message, inspection.details);
  return inspection;
};

const startEstimate = async (work: Work, submission: Submission): Promise<void> => {
  await beginChecks(work, submission);
  await work.em.flush();
  await work.queue.send('estimate', { submission: submission.id, round: submission.round }, { em: work.em });
};

/** Takes a dataset: from nothing to "checking", with its file, in one transaction. */
export const receiveSubmission = async (work: Work, input: ReceiveInput): Promise<Submission> => {
  const seen = input.seen ?? (await inspectDataset(work, input.bytes));
  return inTransaction(work, async (tx) => {
    const { em, clock } = tx;
    const actor = await requireActor(tx);
    const correctionOf = input.correctionOf ?? null;
    const place = await placeDataset(tx, { organisation: input.organisation, contentId: seen.contentId, summary: seen.summary, correctionOf, except: null });
    const id = submissionIdOf(await nextNumber(em, 'submission_number'));
    const fileId = await storeFile(tx, id, 1, input, seen);
    const now = clock.now();
    const submission = em.create(Submission, {
      id, organisation: em.getReference(Organisation, input.organisation), device: place.device, runSheet: place.runSheet, correctionOf, state: 'draft', round: 1,
      title: seen.summary.title, gateClass: seen.summary.gateClass, register: seen.summary.register, fileId, contentId: seen.contentId,
      createdBy: actor.userId, createdAt: now, changedAt: now, access: null, interests: null, embargoUntil: null, notes: null,
      progress: 0, stage: null, replicatesDone: null, replicates: input.replicates ?? usualReplicates, checks: [], estimateId: null,
      claimedBy: null, claimedAt: null, sentAt: null, accession: null, version: null, demo: input.demo ?? false,
    });
    await em.flush();
    await receive(tx, submission);
    await startEstimate(tx, submission);
    return submission;
  }).catch((error: unknown) => Promise.reject(explainUnique(error)));
};

/** A new file for a submission that was blocked or returned, or is ready: the next round. */
export const replaceDataset = async (work: Work, id: string, file: DatasetFile): Promise<Submission> => {
  const seen = file.seen ?? (await inspectDataset(work, file.bytes));
  return inTransaction(work, async (tx) => {
    const submission = await lockSubmission(tx, id);
    await replace(tx, submission);
    const place = await placeDataset(tx, { organisation: submission.organisation.id, contentId: seen.contentId, summary: seen.summary, correctionOf: submission.correctionOf ?? null, except: id });
    submission.round += 1;
    submission.fileId = await storeFile(tx, id, submission.round, file, seen);
    tx.em.assign(submission, {
      device: place.device, runSheet: place.runSheet, title: seen.summary.title, gateClass: seen.summary.gateClass, register: seen.summary.register, contentId: seen.contentId,
      progress: 0, stage: null, replicatesDone: null, checks: [], estimateId: null, claimedBy: null, claimedAt: null, sentAt: null,
    });
    await startEstimate(tx, submission);
    return submission;
  }).catch((error: unknown) => Promise.reject(explainUnique(error)));
};
