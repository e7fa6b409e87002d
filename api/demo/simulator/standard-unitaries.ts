import { fromPairs, identity, kron, zeros, type Matrix } from '#api/demo/simulator/complex-matrix.ts';
import { AppError } from '#shared/errors/app-error.ts';
import type { IdealGate } from '#shared/formats/types.ts';

const h = Math.SQRT1_2;
export const pauliX = fromPairs([[[0, 0], [1, 0]], [[1, 0], [0, 0]]]);
export const pauliY = fromPairs([[[0, 0], [0, -1]], [[0, 1], [0, 0]]]);
export const pauliZ = fromPairs([[[1, 0], [0, 0]], [[0, 0], [-1, 0]]]);
export const paulis: readonly Matrix[] = [identity(2), pauliX, pauliY, pauliZ];
const hadamard = fromPairs([[[h, 0], [h, 0]], [[h, 0], [-h, 0]]]);

/** exp(−iθ/2 (n·σ)), n a unit vector. */
export function turn(n: readonly [number, number, number], theta: number): Matrix {
  const c = Math.cos(theta / 2);
  const s = Math.sin(theta / 2);
  return fromPairs([[[c, -s * n[2]], [-s * n[1], -s * n[0]]], [[s * n[1], -s * n[0]], [c, s * n[2]]]]);
}

function phase(angle: number): Matrix {
  return fromPairs([[[1, 0], [0, 0]], [[0, 0], [Math.cos(angle), Math.sin(angle)]]]);
}

/** The first qubit controls. */
function controlled(u: Matrix): Matrix {
  const out = zeros(4);
  out.re[0] = 1;
  out.re[5] = 1;
  for (let i = 0; i < 4; i += 1) {
    const at = (2 + (i >> 1)) * 4 + 2 + (i & 1);
    out.re[at] = u.re[i]!;
    out.im[at] = u.im[i]!;
  }
  return out;
}

function swap(): Matrix {
  const out = zeros(4);
  for (const at of [0, 6, 9, 15]) out.re[at] = 1;
  return out;
}

const table: Record<string, { params: number; make: (...angles: number[]) => Matrix }> = {
  id: { params: 0, make: () => identity(2) }, x: { params: 0, make: () => pauliX }, y: { params: 0, make: () => pauliY },
  z: { params: 0, make: () => pauliZ }, h: { params: 0, make: () => hadamard }, s: { params: 0, make: () => phase(Math.PI / 2) },
  sdg: { params: 0, make: () => phase(-Math.PI / 2) }, t: { params: 0, make: () => phase(Math.PI / 4) }, tdg: { params: 0, make: () => phase(-Math.PI / 4) },
  sx: { params: 0, make: () => fromPairs([[[0.5, 0.5], [0.5, -0.5]], [[0.5, -0.5], [0.5, 0.5]]]) }, p: { params: 1, make: (a) => phase(a!) },
  rx: { params: 1, make: (a) => turn([1, 0, 0], a!) }, ry: { params: 1, make: (a) => turn([0, 1, 0], a!) }, rz: { params: 1, make: (a) => turn([0, 0, 1], a!) },
  cx: { params: 0, make: () => controlled(pauliX) }, cy: { params: 0, make: () => controlled(pauliY) }, cz: { params: 0, make: () => controlled(pauliZ) },
  ch: { params: 0, make: () => controlled(hadamard) }, cp: { params: 1, make: (a) => controlled(phase(a!)) }, swap: { params: 0, make: swap },
};

/** The unitary of a declared gate: an OpenQASM 3 standard name or the matrix itself. */
export function idealUnitary(ideal: IdealGate): Matrix {
  if ('unitary' in ideal) return fromPairs(ideal.unitary);
  const known = Object.hasOwn(table, ideal.gate) ? table[ideal.gate] : undefined;
  if (!known) throw new AppError('invalid-request', `The simulator has no gate named “${ideal.gate}”.`);
  const angles = ideal.params ?? [];
  if (angles.length !== known.params) throw new AppError('invalid-request', `Gate “${ideal.gate}” takes ${known.params} angles, not ${angles.length}.`);
  return known.make(...angles);
}

/** Two-qubit Pauli operators without the identity, first qubit slowest. */
export function pairPaulis(): Matrix[] {
  return paulis.flatMap((a) => paulis.map((b) => kron(a, b))).slice(1);
}
