import { identity, multiply } from '#tests/shared/method/made.ts';

/** Rotation by `angle` about a unit axis, as a transfer matrix over I, X, Y, Z (right-handed: exp(−i·angle·n·σ/2)). */
export function rotationMap(axis: readonly number[], angle: number): Float64Array {
  const [x, y, z] = axis as [number, number, number];
  const c = Math.cos(angle);
  const s = Math.sin(angle);
  const u = 1 - c;
  return Float64Array.of(
    1, 0, 0, 0,
    0, c + x * x * u, x * y * u - z * s, x * z * u + y * s,
    0, y * x * u + z * s, c + y * y * u, y * z * u - x * s,
    0, z * x * u - y * s, z * y * u + x * s, c + z * z * u,
  );
}

/** X, Y and Z flips of the given probabilities. */
export function flipMap([x, y, z]: readonly [number, number, number]): Float64Array {
  const out = identity(4);
  out[5] = 1 - 2 * (y + z);
  out[10] = 1 - 2 * (x + z);
  out[15] = 1 - 2 * (x + y);
  return out;
}

/** |1⟩ falls to |0⟩ with probability γ. */
export function dampingMap(gamma: number): Float64Array {
  const out = identity(4);
  out[5] = out[10] = Math.sqrt(1 - gamma);
  out[12] = gamma;
  out[15] = 1 - gamma;
  return out;
}

/** ZZ rotation by `angle` and every Pauli but the identity shrunk by 1 − p: what goes wrong between two qubits. */
export function pairErrorMap(angle: number, p: number): Float64Array {
  const out = identity(16);
  const c = Math.cos(angle);
  const s = Math.sin(angle);
  // exp(−i·angle·ZZ/2): of the Paulis that anticommute with ZZ, XI → cos·XI + sin·YZ and so on.
  for (const [from, to, sign] of TURNED) {
    out[from * 16 + from] = c;
    out[to * 16 + from] = sign * s;
  }
  return multiply(shrink(16, p), out, 16);
}

/** Index 4a + b for the Pauli a ⊗ b: XI ↔ YZ, XZ ↔ YI, IX ↔ ZY, ZX ↔ IY. */
const TURNED: readonly (readonly [number, number, number])[] = [
  [4, 11, 1], [11, 4, -1], [7, 8, 1], [8, 7, -1], [1, 14, 1], [14, 1, -1], [13, 2, 1], [2, 13, -1],
];

function shrink(n: number, p: number): Float64Array {
  const out = identity(n);
  for (let i = 1; i < n; i++) out[i * n + i] = 1 - p;
  return out;
}

/** 1 − tr(map)/D: the entanglement infidelity of an error map. */
export function infidelity(map: Float64Array, D: number): number {
  let trace = 0;
  for (let i = 0; i < D; i++) trace += map[i * D + i]!;
  return 1 - trace / D;
}
