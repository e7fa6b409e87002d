import { gateInWords } from '#shared/domain/gate-words.ts';
import type { Dataset, DatasetPatch } from '#shared/formats/types.ts';

export interface PatchSummary {
  qubits: number[];
  circuits: number;
  shots: number;
  minShots: number;
  maxShots: number;
  minLength: number;
  maxLength: number;
}

/** What lists, checks and pages need to know of a dataset without reading its bytes again. Times are UTC. */
export interface DatasetSummary {
  title: string;
  gateClass: string;
  runSheet: { id: string; sha256: string } | null;
  device: { provider: string; name: string; modality: string; firmware: string | null };
  register: string[];
  gates: { label: string; words: string; targets: number[] }[];
  patches: PatchSummary[];
  circuits: number;
  startedAt: string;
  endedAt: string;
  software: string;
  notes: string | null;
  contributors: { name: string; orcid: string | null }[];
  licence: string;
}

const range = (values: number[]): [number, number] => values.reduce<[number, number]>(([low, high], v) => [Math.min(low, v), Math.max(high, v)], [Number.MAX_SAFE_INTEGER, 0]);

const summarisePatch = (patch: DatasetPatch): PatchSummary => {
  const [minShots, maxShots] = range(patch.circuits.map((c) => c.shots));
  const [minLength, maxLength] = range(patch.circuits.map((c) => c.gates.length));
  return { qubits: patch.qubits, circuits: patch.circuits.length, shots: patch.circuits.reduce((sum, c) => sum + c.shots, 0), minShots, maxShots, minLength, maxLength };
};

/** Summary of a dataset that has passed the schema and the semantic checks. */
export const summariseDataset = (dataset: Dataset): DatasetSummary => ({
  title: dataset.title,
  gateClass: dataset.gateClass,
  runSheet: dataset.runSheet ?? null,
  device: { provider: dataset.device.provider, name: dataset.device.name, modality: dataset.device.modality, firmware: dataset.device.firmware ?? null },
  register: dataset.register,
  gates: dataset.gates.map(({ label, ideal, targets }) => ({ label, words: gateInWords(ideal), targets })),
  patches: dataset.patches.map(summarisePatch),
  circuits: dataset.patches.reduce((sum, patch) => sum + patch.circuits.length, 0),
  startedAt: new Date(dataset.acquisition.startedAt).toISOString(),
  endedAt: new Date(dataset.acquisition.endedAt).toISOString(),
  software: dataset.acquisition.software,
  notes: dataset.acquisition.notes || null,
  contributors: dataset.contributors.map(({ name, orcid }) => ({ name, orcid: orcid ?? null })),
  licence: dataset.licence,
});
