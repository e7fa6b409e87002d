import { simulateDataset } from '#api/demo/simulator/simulate-dataset.ts';
import { perfectPair, perfectQubit, type DeviceModel } from '#api/demo/simulator/device-model.ts';
import type { Dataset, GateDeclaration } from '#shared/formats/types.ts';
import { drawCircuits, QUARTER, seeded } from '#tests/shared/method/made.ts';

/** Quarter turns on each of n qubits and cz on each pair of neighbours. */
export function lineGates(n: number): GateDeclaration[] {
  const local = Array.from({ length: n }, (_, q) => ['rx', 'ry'].map((gate) => ({ label: `${gate}${q}`, targets: [q], ideal: { gate, params: [QUARTER] } }))).flat();
  return [...local, ...Array.from({ length: n - 1 }, (_, q) => ({ label: `cz${q}${q + 1}`, targets: [q, q + 1], ideal: { gate: 'cz' } }))];
}

/** A device with small errors of every kind that the model can hold, none of them on idle qubits. */
export function lineModel(n: number): DeviceModel {
  const qubits = Array.from({ length: n }, (_, q) => ({
    ...perfectQubit, angleScale: { x: 0.004 + 0.002 * q, y: -0.005, z: 0 }, detuning: 0.003, flips: { x: 1e-4, y: 0, z: 3e-4 }, damping: 2e-4, preparation: 0.01, readout: { zeroAsOne: 0.01, oneAsZero: 0.02 },
  }));
  return { qubits, pairs: Array.from({ length: n - 1 }, (_, q) => ({ ...perfectPair(q, q + 1), angle: 0.02, phases: [0.01, -0.005] as [number, number], depolarising: 0.004 })) };
}

export interface PatchDraw {
  qubits: number[];
  count: number;
  lengths: number[];
}

/** One patch a qubit and one a pair of neighbours, lengths as in the classes. */
export function linePatches(n: number, local: number, pair: number): PatchDraw[] {
  const locals = Array.from({ length: n }, (_, q) => ({ qubits: [q], count: local, lengths: [2, 4, 8, 16] }));
  return [...locals, ...Array.from({ length: n - 1 }, (_, q) => ({ qubits: [q, q + 1], count: pair, lengths: [4, 8, 12, 16] }))];
}

/** Counts of a simulated device (density matrices, no part of the method) for circuits drawn from all gates of each patch. */
export function makeRegister(name: string, gates: GateDeclaration[], patches: PatchDraw[], gateClass = 'custom', model?: DeviceModel): Dataset {
  const size = 1 + Math.max(...gates.flatMap((g) => g.targets));
  const generator = seeded(name);
  return simulateDataset({
    sheet: {
      format: 'evenbeam.run-sheet', formatVersion: '1.0.0', id: null, gateClass, device: null, register: Array.from({ length: size }, (_, q) => `q${q}`), gates, shots: 1000, seed: '00', sealSha256: null, drawnAt: null,
      patches: patches.map(({ qubits, count, lengths }, p) => ({
        qubits, sealed: 0,
        circuits: drawCircuits(gates.filter((g) => g.targets.every((t) => qubits.includes(t))), lengths, count, generator).map((c) => ({ ...c, id: `p${p}${c.id}` })),
      })),
    },
    sheetSha256: null, model: model ?? lineModel(size), seed: name, title: name, device: { provider: 'Pellmere Instruments', name: 'Reed-1', modality: 'simulated' },
    startedAt: new Date('2026-01-01T00:00:00Z'), endedAt: new Date('2026-01-01T01:00:00Z'), software: 'test', contributors: [{ name: 'A. Example' }],
  });
}
