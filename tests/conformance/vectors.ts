import { canonicalJson, sha256Hex } from '#shared/formats/canonical-json.ts';
import { littleEndianBytes } from '#shared/formats/float64.ts';
import { readCircuits } from '#shared/formats/read-circuits.ts';
import { readDataset } from '#shared/formats/read-dataset.ts';
import { readSeal } from '#shared/formats/read-seal.ts';
import { estimate } from '#shared/method/estimate.ts';

/** One file of the published set: its address is relative to the index. */
export interface FileEntry {
  path: string;
  bytes: number;
  sha256: string;
}

export interface VectorEntry {
  name: string;
  about: string;
  replicates: number;
  contentId: string;
  files: { dataset: FileEntry; runSheet: FileEntry | null; seal: FileEntry | null; circuits: FileEntry; result: FileEntry };
  /** Of the companion table of replicates: figures × replicates, float64 little-endian. */
  replicatesSha256: string;
}

export interface ConformanceIndex {
  format: 'evenbeam.conformance';
  formatVersion: '1.0.0';
  method: string;
  vectors: VectorEntry[];
  sampler: FileEntry;
}

export interface VectorFiles {
  dataset: Uint8Array;
  seal: Uint8Array | null;
  circuits: Uint8Array;
}

/** Reads the files of a vector as the registry would and estimates: the result's canonical text and the digest of its replicates. */
export function estimateVector(files: VectorFiles, replicates: number): { result: string; replicatesSha256: string } {
  const reading = readDataset(files.dataset);
  if (!reading.ok) throw new Error(`The dataset breaks the format: ${JSON.stringify(reading.errors.slice(0, 3))}`);
  const { dataset, contentId, gateClass } = reading;
  const seal = files.seal ? readSeal(files.seal, dataset) : null;
  const circuits = readCircuits(files.circuits, dataset);
  if (seal?.ok === false || !circuits.ok) throw new Error(`Seal or circuits break the format: ${JSON.stringify([seal, circuits]).slice(0, 300)}`);
  const output = estimate({ dataset, contentId, gateClass, seal: seal?.seal ?? null, predict: circuits.circuits, replicates });
  return { result: canonicalJson(output.result), replicatesSha256: sha256Hex(littleEndianBytes(output.replicates.values)) };
}
