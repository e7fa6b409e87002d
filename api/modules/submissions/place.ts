import { UniqueConstraintViolationException } from '@mikro-orm/core';
import { isLive, submissionStates } from '#shared/domain/life-cycle.ts';
import { accessionPattern } from '#shared/domain/ids.ts';
import { AppError } from '#shared/errors/app-error.ts';
import { Device } from '#api/entities/device.ts';
import { EntryVersion } from '#api/entities/entry-version.ts';
import { RunSheet } from '#api/entities/run-sheet.ts';
import { Submission } from '#api/entities/submission.ts';
import type { Work } from '#api/lib/work.ts';
import type { DatasetSummary } from './dataset-summary.ts';

const liveStates = submissionStates.filter(isLive);

/** Where a dataset belongs among what the organisation has. Missing device or sheet: told by the checks, with the remedy. */
export interface Place {
  device: Device | null;
  runSheet: RunSheet | null;
}

const sameText = (a: string, b: string): boolean => a.trim().toLowerCase() === b.trim().toLowerCase();

/** The organisation's device that a file names by provider and name, in any case of letters. */
export const findDevice = async ({ em }: Work, organisation: string, named: { provider: string; name: string }): Promise<Device | null> => {
  const devices = await em.find(Device, { organisation }, { populate: ['organisation'] });
  return devices.find((d) => sameText(d.name, named.name) && sameText(d.organisation.$.name, named.provider)) ?? null;
};

/** Refuses content that counts already; names the other submission only to its own organisation. */
const refuseDuplicate = async (work: Work, organisation: string, contentId: string, except: string | null): Promise<void> => {
  const other = await work.em.findOne(Submission, { contentId, state: { $in: liveStates }, ...(except ? { id: { $ne: except } } : {}) });
  if (!other) return;
  if (other.organisation.id === organisation) throw new AppError('duplicate-content', `${other.id} holds the same dataset (content id ${contentId}). Continue there, or cancel it first.`);
  throw new AppError('duplicate-content', `A dataset of the same content id (${contentId}) is in the registry already.`);
};

/**
 * A sheet counts once. It stays used when its submission was estimated and then given up, because by then its
 * contributor has seen how the sealed circuits came out; only a correction of the sheet's own entry takes it again.
 */
const refuseUsedSheet = async (work: Work, sheet: RunSheet, correctionOf: string | null, except: string | null): Promise<void> => {
  const used = await work.em.find(Submission, { runSheet: sheet.id, $or: [{ state: { $in: liveStates } }, { estimateId: { $ne: null } }], ...(except ? { id: { $ne: except } } : {}) });
  const other = used.find((s) => correctionOf === null || (s.accession ?? s.correctionOf) !== correctionOf);
  if (!other) return;
  const way = isLive(other.state) && !other.estimateId ? 'cancel that submission first, or draw a new sheet' : 'draw a new sheet';
  throw new AppError('already-exists', `${other.id} holds the dataset of run sheet ${sheet.id}. A sheet counts once: ${way}.`);
};

/** A correction goes to an entry of the same organisation, device, register and gate class. */
const refuseStrangeCorrection = async (work: Work, organisation: string, accession: string, summary: DatasetSummary, device: Device | null): Promise<void> => {
  const place = 'In the query, correctionOf: ';
  const entry = accessionPattern.test(accession) ? await work.em.findOne(EntryVersion, { accession, organisation }, { orderBy: { version: 'desc' } }) : null;
  if (!entry) throw new AppError('invalid-request', `${place}${JSON.stringify(accession)} is not an entry of your organisation.`);
  const faults = [
    entry.device.id !== device?.id && `the device is ${JSON.stringify(summary.device.name)}`,
    entry.gateClass !== summary.gateClass && `the gate class is ${summary.gateClass}, not ${entry.gateClass}`,
    JSON.stringify(entry.register) !== JSON.stringify(summary.register) && `the register is ${summary.register.join(', ')}, not ${entry.register.join(', ')}`,
  ].filter((fault): fault is string => Boolean(fault));
  if (faults.length > 0) throw new AppError('invalid-request', `${place}the file cannot correct ${accession}: ${faults.join('; ')}.`);
};

/** Finds device and sheet of a file and refuses what must not stand beside what is there. */
export const placeDataset = async (work: Work, file: { organisation: string; contentId: string; summary: DatasetSummary; correctionOf: string | null; except: string | null }): Promise<Place> => {
  const { organisation, summary, correctionOf, except } = file;
  await refuseDuplicate(work, organisation, file.contentId, except);
  const device = await findDevice(work, organisation, summary.device);
  const runSheet = summary.runSheet ? await work.em.findOne(RunSheet, { id: summary.runSheet.id, organisation, state: 'drawn' }) : null;
  if (correctionOf !== null) await refuseStrangeCorrection(work, organisation, correctionOf, summary, device);
  if (runSheet) await refuseUsedSheet(work, runSheet, correctionOf, except);
  return { device, runSheet };
};

/** Two requests at the same instant: the database's unique indexes decide, and the loser is told what the check would have said. */
export const explainUnique = (error: unknown): unknown => {
  if (!(error instanceof UniqueConstraintViolationException)) return error;
  if (error.message.includes('submission_live_content')) return new AppError('duplicate-content', 'A dataset of the same content id is in the registry already.');
  if (error.message.includes('submission_live_sheet')) return new AppError('already-exists', 'The run sheet of this dataset is used by another submission. A sheet counts once.');
  return error;
};
