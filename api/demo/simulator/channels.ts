import { fromPairs, identity, scale, type Matrix } from '#api/demo/simulator/complex-matrix.ts';
import { pairPaulis, paulis } from '#api/demo/simulator/standard-unitaries.ts';

/** One Kraus operator K on qubits; `beyond` is the factor by which it multiplies states outside the qubit levels. */
export interface Kraus {
  matrix: Matrix;
  beyond: number;
}

/** A map ρ → Σ K ρ K†; the squares of `beyond` sum to 1, so it stays trace preserving on a third level too. */
export type Channel = Kraus[];

export function unitaryChannel(matrix: Matrix): Channel {
  return [{ matrix, beyond: 1 }];
}

function mixture(weights: readonly number[], unitaries: readonly Matrix[]): Channel {
  return unitaries.flatMap((u, i) => {
    const root = Math.sqrt(weights[i]!);
    return root > 0 ? [{ matrix: scale(u, root), beyond: root }] : [];
  });
}

/** X, Y and Z flips with the given probabilities. */
export function flipChannel(flips: { x: number; y: number; z: number }): Channel {
  return mixture([1 - flips.x - flips.y - flips.z, flips.x, flips.y, flips.z], paulis);
}

/** Two qubits: ρ → (1 − p)ρ + p·I/4, as fifteen flips of probability p/16 each. */
export function pairDepolarisingChannel(p: number): Channel {
  return mixture([1 - (15 * p) / 16, ...Array.from({ length: 15 }, () => p / 16)], [identity(4), ...pairPaulis()]);
}

/** |1⟩ falls to |0⟩ with probability γ. */
export function dampingChannel(gamma: number): Channel {
  const stay = fromPairs([[[1, 0], [0, 0]], [[0, 0], [Math.sqrt(1 - gamma), 0]]]);
  if (gamma === 0) return [{ matrix: stay, beyond: 1 }];
  return [{ matrix: stay, beyond: 1 }, { matrix: fromPairs([[[0, 0], [Math.sqrt(gamma), 0]], [[0, 0], [0, 0]]]), beyond: 0 }];
}

/** The same damping over several gate times. */
export function dampingOver(gamma: number, times: number): Channel {
  return dampingChannel(1 - (1 - gamma) ** times);
}

/**
 * The same flips over several gate times. Flips commute, so n times multiply each Pauli's damping factor
 * (1 − 2·probability of the two that anticommute with it) to the power n.
 */
export function flipsOver(flips: { x: number; y: number; z: number }, times: number): Channel {
  const factor = (a: number, b: number): number => (1 - 2 * (a + b)) ** times;
  const [fx, fy, fz] = [factor(flips.y, flips.z), factor(flips.x, flips.z), factor(flips.x, flips.y)];
  const part = (same: number, p: number, q: number): number => Math.max(0, (1 + same - p - q) / 4);
  return flipChannel({ x: part(fx, fy, fz), y: part(fy, fx, fz), z: part(fz, fx, fy) });
}

/** On a three-level system: |1⟩ → |2⟩ with probability `out`, |2⟩ → |1⟩ with probability `back`. */
export function leakageOperators(leak: { out: number; back: number }): Matrix[] {
  const unit = (row: number, column: number, x: number): Matrix => {
    const rows = [0, 1, 2].map((i) => [0, 1, 2].map((j): [number, number] => [i === row && j === column ? x : 0, 0]));
    return fromPairs(rows);
  };
  const stay = fromPairs([[[1, 0], [0, 0], [0, 0]], [[0, 0], [Math.sqrt(1 - leak.out), 0], [0, 0]], [[0, 0], [0, 0], [Math.sqrt(1 - leak.back), 0]]]);
  return [stay, unit(2, 1, Math.sqrt(leak.out)), unit(1, 2, Math.sqrt(leak.back))];
}
