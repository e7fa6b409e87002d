import { AppError, type ErrorDetail } from '#shared/errors/app-error.ts';
import { limits } from '#shared/formats/limits.ts';
import { readDataset } from '#shared/formats/read-dataset.ts';
import { summarise, type DatasetSummary } from './dataset-summary.ts';
import { gunzipBounded } from './gunzip-bounded.ts';

export type FileReading =
  | { ok: true; gzip: boolean; summary: DatasetSummary; contentId: string; bytesSha256: string }
  | { ok: false; errors: readonly ErrorDetail[] };

const refused = (message: string): FileReading => ({ ok: false, errors: [{ pointer: '', message }] });

/** The two bytes that open every gzip file (RFC 1952). */
const isGzip = (bytes: Uint8Array): boolean => bytes[0] === 0x1f && bytes[1] === 0x8b;

/** Reads a dataset file, plain or gzip, as the registry will: the same rules, the same sentences, at most 50 of them. */
export async function readDatasetFile(file: Blob): Promise<FileReading> {
  const gzip = isGzip(new Uint8Array(await file.slice(0, 2).arrayBuffer()));
  if (!gzip && file.size > limits.bytes) return refused(`The file is larger than ${limits.bytes / 2 ** 20} MiB; that is the most allowed.`);
  try {
    const reading = readDataset(gzip ? await gunzipBounded(file) : new Uint8Array(await file.arrayBuffer()));
    return reading.ok ? { ok: true, gzip, summary: summarise(reading.dataset), contentId: reading.contentId, bytesSha256: reading.bytesSha256 } : reading;
  } catch (error) {
    if (error instanceof AppError) return refused(error.message);
    throw error;
  }
}
