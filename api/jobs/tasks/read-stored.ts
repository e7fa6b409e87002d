import { readDataset, type DatasetReading } from '#shared/formats/read-dataset.ts';

/** A dataset that was checked when it came in. That it cannot be read now is the registry's own fault. */
export const readStored = (bytes: Uint8Array): Extract<DatasetReading, { ok: true }> => {
  const reading = readDataset(bytes);
  if (!reading.ok) throw new Error(`A stored dataset cannot be read any more: ${reading.errors[0]?.pointer} ${reading.errors[0]?.message}`);
  return reading;
};
