import { limits } from '#shared/formats/limits.ts';
import { readDataset } from '#shared/formats/read-dataset.ts';
import type { ErrorDetail } from '#shared/errors/app-error.ts';
import { summarise, type DatasetSummary } from './dataset-summary.ts';

export type FileReading =
  | { ok: true; gzip: boolean; summary: DatasetSummary; contentId: string }
  | { ok: false; errors: readonly ErrorDetail[] };

const tooLarge = (): FileReading => ({ ok: false, errors: [{ pointer: '', message: `The file is larger than ${limits.bytes / 2 ** 20} MiB when unpacked.` }] });

/** The two bytes that open every gzip file (RFC 1952). */
const isGzip = (bytes: Uint8Array): boolean => bytes[0] === 0x1f && bytes[1] === 0x8b;

/** Unpacks up to the limit; null beyond it, so that a small file cannot fill the memory. Throws where the bytes are not gzip. */
async function unpack(packed: Blob): Promise<Uint8Array | null> {
  const reader = packed.stream().pipeThrough(new DecompressionStream('gzip')).getReader();
  const chunks: Uint8Array[] = [];
  let size = 0;
  for (;;) {
    const { done, value } = await reader.read();
    if (done) break;
    size += value.byteLength;
    if (size > limits.bytes) {
      await reader.cancel();
      return null;
    }
    chunks.push(value);
  }
  const whole = new Uint8Array(size);
  let at = 0;
  for (const chunk of chunks) {
    whole.set(chunk, at);
    at += chunk.byteLength;
  }
  return whole;
}

/** Reads a dataset file, plain or gzip, as the registry will: the same rules, the same sentences, at most 50 of them. */
export async function readFile(file: Blob): Promise<FileReading> {
  const gzip = isGzip(new Uint8Array(await file.slice(0, 2).arrayBuffer()));
  if (!gzip && file.size > limits.bytes) return tooLarge();
  let bytes: Uint8Array | null;
  try {
    bytes = gzip ? await unpack(file) : new Uint8Array(await file.arrayBuffer());
  } catch {
    return { ok: false, errors: [{ pointer: '', message: 'The file begins like gzip but cannot be unpacked. Compress it again.' }] };
  }
  if (bytes === null) return tooLarge();
  const reading = readDataset(bytes);
  return reading.ok ? { ok: true, gzip, summary: summarise(reading.dataset), contentId: reading.contentId } : reading;
}
