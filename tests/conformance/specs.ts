import { gateClassById } from '#shared/domain/gate-classes.ts';
import type { ComplexMatrix, GateDeclaration } from '#shared/formats/types.ts';
import type { Faults } from './device.ts';

export interface PatchSpec {
  qubits: number[];
  circuits: number;
  /** Sealed beside them. */
  sealed: number;
  lengths: readonly number[];
  labels: readonly string[];
}

/** What a vector is made from; everything else follows from these and the name, which seeds the draws. */
export interface VectorSpec {
  name: string;
  about: string;
  gateClass: string;
  register: string[];
  gates: readonly GateDeclaration[];
  patches: PatchSpec[];
  /** In turn, circuit by circuit. */
  shots: readonly number[];
  faults: Faults;
  replicates: number;
  /** Zero counts are left out of the file. */
  sparse?: boolean;
  /** Circuits that are to be predicted. */
  predict: { qubits: number[]; gates: string[] }[];
}

const mild: Faults = { lost: 0.0015, turn: 0.015, misread: 0.012 };
const gatesOf = (id: string): readonly GateDeclaration[] => gateClassById(id)!.gates;
const quarter = Math.PI / 2;
const gate = (label: string, targets: number[], name: string, params?: number[]): GateDeclaration => ({ label, targets, ideal: params ? { gate: name, params } : { gate: name } });

/** A turn by 2π/3 about (1, 1, 1)/√3: every entry ±½ in both parts. */
const thirdTurn: ComplexMatrix = [[[0.5, -0.5], [-0.5, -0.5]], [[0.5, -0.5], [0.5, 0.5]]];

const oneQubit = (name: string, about: string, gateClass: string, circuits: number, sealed: number, more: Partial<VectorSpec> = {}): VectorSpec => {
  const gates = gatesOf(gateClass);
  const labels = gates.map(({ label }) => label);
  const [a = '', b = '', c = ''] = labels;
  return {
    name, about, gateClass, register: ['q0'], gates, patches: [{ qubits: [0], circuits, sealed, lengths: [2, 4, 8, 16], labels }], shots: [500], faults: mild, replicates: 200,
    predict: [[], [b], [b, c, c, b], Array.from({ length: 12 }, (_, i) => [a, b, c, b][i % 4]!)].map((sequence) => ({ qubits: [0], gates: sequence })), ...more,
  };
};

const chainedLabels = (qubits: number[], id: boolean): string[] => gatesOf('chained-cz-2q/1').filter((g) => g.targets.every((t) => qubits.includes(t)) && (id || !g.label.startsWith('id'))).map(({ label }) => label);

export const vectorSpecs: readonly VectorSpec[] = [
  oneQubit('quarter-turn', 'One qubit, complete, with sealed circuits and all 2,000 replicates.', 'quarter-turn-1q/1', 100, 25, { replicates: 2000 }),
  oneQubit('clifford-t', 'One qubit, complete but weakly determined, with sealed circuits.', 'clifford-t-1q/1', 220, 55),
  oneQubit('half-turn', 'One qubit, incomplete: rank 7, prediction figures to first order only.', 'half-turn-1q/1', 90, 0, { faults: { lost: 0.001, turn: 0.001, misread: 0.01 } }),
  {
    ...oneQubit('one-length', 'Every circuit of length 8: rank 30 of 31, gate loss lost, predictions of that length kept.', 'clifford-t-1q/1', 0, 0),
    patches: [{ qubits: [0], circuits: 160, sealed: 0, lengths: [8], labels: ['id', 'h', 't'] }],
    predict: [{ qubits: [0], gates: ['h', 't', 'id', 'h', 't', 't', 'h', 'id'] }, { qubits: [0], gates: ['h', 't', 'h', 't'] }],
  },
  {
    name: 'own-gates', about: 'One qubit, gates of no class, one a unitary written out; shots of three sizes; zero counts left out; a circuit of depth 0.',
    gateClass: 'custom', register: ['left'], gates: [gate('v', [0], 'sx'), { label: 'third', targets: [0], ideal: { unitary: thirdTurn } }, gate('r', [0], 'rz', [0.7])],
    patches: [{ qubits: [0], circuits: 150, sealed: 0, lengths: [0, 1, 3, 7, 12], labels: ['v', 'third', 'r'] }], shots: [40, 1000, 6000], faults: mild, replicates: 200, sparse: true,
    predict: [{ qubits: [0], gates: [] }, { qubits: [0], gates: ['v', 'third', 'r', 'v'] }],
  },
  {
    name: 'pair', about: 'A joint pair, 1,023 parameters, with sealed circuits.',
    gateClass: 'quarter-turn-cz-2q/1', register: ['q4', 'q7'], gates: gatesOf('quarter-turn-cz-2q/1'),
    patches: [{ qubits: [0, 1], circuits: 900, sealed: 40, lengths: [4, 8, 12, 16], labels: gatesOf('quarter-turn-cz-2q/1').map(({ label }) => label) }], shots: [1000], faults: mild, replicates: 40,
    predict: [{ qubits: [0, 1], gates: [] }, { qubits: [0, 1], gates: ['rx0', 'cz01', 'ry1', 'cz01'] }],
  },
  {
    name: 'pair-turned', about: 'A joint pair whose patch lists the second qubit first, with cx from the second qubit to the first; zero counts left out, shots of two sizes.',
    gateClass: 'custom', register: ['a', 'b'], gates: [gate('xa', [0], 'rx', [quarter]), gate('yb', [1], 'ry', [quarter]), { label: 'third-b', targets: [1], ideal: { unitary: thirdTurn } }, gate('ya', [0], 'ry', [quarter]), gate('ba', [1, 0], 'cx')],
    patches: [{ qubits: [1, 0], circuits: 800, sealed: 0, lengths: [4, 8, 12, 16], labels: ['xa', 'yb', 'third-b', 'ya', 'ba'] }], shots: [800, 2000], faults: mild, replicates: 20, sparse: true,
    predict: [{ qubits: [1, 0], gates: ['yb'] }, { qubits: [1, 0], gates: ['yb', 'ba', 'xa', 'ba', 'third-b'] }],
  },
  {
    name: 'chained-pair', about: 'A chained register of two: one-qubit patches, then the entangling gate given them; sealed circuits of every patch.',
    gateClass: 'chained-cz-2q/1', register: ['q1', 'q2'], gates: gatesOf('chained-cz-2q/1'),
    patches: [
      { qubits: [0], circuits: 120, sealed: 30, lengths: [2, 4, 8, 16], labels: chainedLabels([0], true) },
      { qubits: [1], circuits: 120, sealed: 30, lengths: [2, 4, 8, 16], labels: chainedLabels([1], true) },
      { qubits: [0, 1], circuits: 400, sealed: 60, lengths: [4, 8, 12, 16], labels: chainedLabels([0, 1], false) },
    ],
    shots: [1000], faults: mild, replicates: 100,
    predict: [{ qubits: [0, 1], gates: ['rx0', 'ry1', 'cz01', 'ry0'] }, { qubits: [1, 0], gates: ['rx0', 'ry1', 'cz01', 'ry0'] }, { qubits: [1], gates: ['rx1', 'ry1'] }],
  },
];
