import { decodeJson } from '#shared/formats/decode-json.ts';
import { readDataset } from '#shared/formats/read-dataset.ts';
import { summariseDataset } from '#api/modules/submissions/dataset-summary.ts';
import type { Inspection } from '#api/modules/submissions/inspection.ts';

/** Reads a dataset file whole: its faults with their places, or what the registry needs to know of it. */
export const inspectDataset = ({ bytes }: { bytes: Uint8Array }): Inspection => {
  if (bytes.length === 0) return { ok: false, code: 'malformed-json', message: 'The file is empty.', details: [{ pointer: '', message: 'The file is empty.' }] };
  if (bytes[0] === 0x1f && bytes[1] === 0x8b) {
    const message = 'The body is gzip, but the Content-Encoding header does not say so.';
    return { ok: false, code: 'malformed-json', message, details: [{ pointer: '', message }] };
  }
  const reading = readDataset(bytes);
  if (reading.ok) return { ok: true, contentId: reading.contentId, bytesSha256: reading.bytesSha256, summary: summariseDataset(reading.dataset) };
  const first = reading.errors[0];
  const more = reading.errors.length > 1 ? ` And ${reading.errors.length - 1} more.` : '';
  return {
    ok: false,
    code: decodeJson(bytes).ok ? 'unusable-file' : 'malformed-json',
    message: `${first?.pointer ? `${first.pointer}: ` : ''}${first?.message ?? 'The file cannot be used.'}${more}`,
    details: reading.errors,
  };
};
