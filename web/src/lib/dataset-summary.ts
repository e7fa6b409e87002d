import type { Dataset } from '#shared/formats/types.ts';

/** What was read from a file, in plain values that cross the worker's border. */
export interface DatasetSummary {
  title: string;
  gateClass: string;
  runSheet: string | null;
  provider: string;
  device: string;
  register: string[];
  gates: string[];
  patches: number;
  circuits: number;
  /** Shots over all circuits. */
  shots: number;
  lengths: { shortest: number; longest: number };
  /** Blocks named in the file; 0 = the circuits carry none. */
  blocks: number;
  startedAt: string;
  endedAt: string;
  contributors: string[];
  licence: string;
}

export const summarise = (dataset: Dataset): DatasetSummary => {
  const circuits = dataset.patches.flatMap((patch) => patch.circuits);
  let shots = 0, shortest = Number.POSITIVE_INFINITY, longest = 0;
  const blocks = new Set<number>();
  for (const circuit of circuits) {
    shots += circuit.shots;
    shortest = Math.min(shortest, circuit.gates.length);
    longest = Math.max(longest, circuit.gates.length);
    if (circuit.block !== undefined) blocks.add(circuit.block);
  }
  return {
    title: dataset.title, gateClass: dataset.gateClass, runSheet: dataset.runSheet?.id ?? null,
    provider: dataset.device.provider, device: dataset.device.name, register: dataset.register,
    gates: dataset.gates.map((gate) => gate.label), patches: dataset.patches.length,
    circuits: circuits.length, shots, lengths: { shortest: circuits.length === 0 ? 0 : shortest, longest }, blocks: blocks.size,
    startedAt: dataset.acquisition.startedAt, endedAt: dataset.acquisition.endedAt,
    contributors: dataset.contributors.map((person) => person.name), licence: dataset.licence,
  };
};
