import type { GateDeclaration } from '#shared/formats/types.ts';

/**
 * A plain state-vector simulation, independent of the transfer matrices of shared/quantum, so that the shipped
 * bench circuits are chosen by one route and checked in tests by another.
 * A state of n qubits is 2^n amplitudes as [re, im] pairs; the first qubit is the most significant bit.
 */
type Complex = [number, number];

const half = Math.SQRT1_2;
const oneQubitMatrices: Record<string, (angle: number) => [Complex, Complex, Complex, Complex]> = {
  id: () => [[1, 0], [0, 0], [0, 0], [1, 0]],
  x: () => [[0, 0], [1, 0], [1, 0], [0, 0]],
  y: () => [[0, 0], [0, -1], [0, 1], [0, 0]],
  z: () => [[1, 0], [0, 0], [0, 0], [-1, 0]],
  h: () => [[half, 0], [half, 0], [half, 0], [-half, 0]],
  t: () => [[1, 0], [0, 0], [0, 0], [half, half]],
  rx: (a) => [[Math.cos(a / 2), 0], [0, -Math.sin(a / 2)], [0, -Math.sin(a / 2)], [Math.cos(a / 2), 0]],
  ry: (a) => [[Math.cos(a / 2), 0], [-Math.sin(a / 2), 0], [Math.sin(a / 2), 0], [Math.cos(a / 2), 0]],
};

const times = (a: Complex, b: Complex): Complex => [a[0] * b[0] - a[1] * b[1], a[0] * b[1] + a[1] * b[0]];
const plus = (a: Complex, b: Complex): Complex => [a[0] + b[0], a[1] + b[1]];
const zero: Complex = [0, 0];

function apply(state: Complex[], qubits: number, gate: GateDeclaration): Complex[] {
  const mask = gate.targets.map((target) => 1 << (qubits - 1 - target));
  if (!('gate' in gate.ideal)) throw new Error(`gate "${gate.label}" has no standard name`);
  const { gate: name, params } = gate.ideal;
  if (name === 'cz') return state.map((a, index) => (mask.every((bit) => index & bit) ? [-a[0], -a[1]] : a));
  const matrix = oneQubitMatrices[name]?.(params?.[0] ?? 0);
  const bit = mask[0];
  if (!matrix || bit === undefined) throw new Error(`gate "${gate.label}" is "${name}", which this simulation does not know`);
  return state.map((_, index) => {
    const row = index & bit ? 1 : 0;
    const [low, high] = [state[index & ~bit] ?? zero, state[index | bit] ?? zero];
    return plus(times(matrix[2 * row] ?? zero, low), times(matrix[2 * row + 1] ?? zero, high));
  });
}

/** Outcome probabilities of a circuit of labels on |0…0⟩, outcomes ascending as bit strings. */
export function idealProbabilities(gates: readonly GateDeclaration[], qubits: number, circuit: readonly string[]): number[] {
  const byLabel = new Map(gates.map((gate) => [gate.label, gate]));
  let state: Complex[] = Array.from({ length: 2 ** qubits }, (_, index) => (index === 0 ? [1, 0] : [0, 0]));
  for (const label of circuit) {
    const gate = byLabel.get(label);
    if (!gate) throw new Error(`no gate is called "${label}"`);
    state = apply(state, qubits, gate);
  }
  return state.map(([re, im]) => re * re + im * im);
}
