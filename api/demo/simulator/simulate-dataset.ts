import { createSimulator, type CircuitSimulator } from '#api/demo/simulator/circuit-simulator.ts';
import type { DeviceModel } from '#api/demo/simulator/device-model.ts';
import { createGenerator } from '#api/demo/simulator/generator.ts';
import { sampleCounts } from '#api/demo/simulator/sample-counts.ts';
import type { Dataset, DatasetCircuit, RunSheet } from '#shared/formats/types.ts';

export interface SimulatedRun {
  sheet: RunSheet;
  /** Digest of the sheet as it was issued, hex; null for a sheet without a number. */
  sheetSha256: string | null;
  /** The hidden truth, its qubits in the order of the sheet's register. */
  model: DeviceModel;
  /** Any text; the same text gives the same counts. */
  seed: string;
  title: string;
  device: Dataset['device'];
  startedAt: Date;
  endedAt: Date;
  software: string;
  notes?: string;
  contributors: Dataset['contributors'];
  licence?: string;
  extra?: Record<string, unknown>;
}

/** Groups of circuits taken together in time. */
const blocks = 8;

/** Run a sheet on a simulated device: every circuit once, in the order of the sheet, in eight blocks spread over the run. */
export function simulateDataset(run: SimulatedRun): Dataset {
  const { sheet } = run;
  const stream = createGenerator(`run:${run.seed}`);
  const patches = sheet.patches.map((patch) => {
    const simulators = new Map<number, CircuitSimulator>();
    const circuits = patch.circuits.map((circuit, i): DatasetCircuit => {
      const block = 1 + Math.floor((i * blocks) / patch.circuits.length);
      let simulator = simulators.get(block);
      if (!simulator) simulators.set(block, (simulator = createSimulator(run.model, sheet.gates, patch.qubits, (2 * block - 1) / blocks - 1)));
      const counts = sampleCounts(simulator.probabilities(circuit.gates), sheet.shots, stream);
      return { id: circuit.id, gates: [...circuit.gates], shots: sheet.shots, counts: named(counts, patch.qubits.length), block };
    });
    return { qubits: [...patch.qubits], circuits };
  });
  const acquisition = { startedAt: instant(run.startedAt), endedAt: instant(run.endedAt), software: run.software };
  return {
    format: 'evenbeam.dataset', formatVersion: '1.0.0', title: run.title, gateClass: sheet.gateClass,
    runSheet: sheet.id !== null && run.sheetSha256 !== null ? { id: sheet.id, sha256: run.sheetSha256 } : null,
    device: { ...run.device }, register: [...sheet.register], gates: structuredClone(sheet.gates), patches,
    acquisition: run.notes === undefined ? acquisition : { ...acquisition, notes: run.notes },
    contributors: run.contributors.map((c) => ({ ...c })), licence: run.licence ?? 'CC-BY-4.0',
    ...(run.extra ? { extra: run.extra } : {}),
  };
}

/** Bit strings as keys; outcomes that never came are left out. */
function named(counts: readonly number[], qubits: number): Record<string, number> {
  return Object.fromEntries(counts.flatMap((n, o) => (n > 0 ? [[o.toString(2).padStart(qubits, '0'), n]] : [])));
}

/** ISO 8601 in UTC, whole seconds. */
function instant(date: Date): string {
  return `${date.toISOString().slice(0, 19)}Z`;
}
