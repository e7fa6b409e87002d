import sincos from '@stdlib/math-base-special-sincos';
import { complexSquare, type ComplexSquare } from '#shared/quantum/complex-matrix.ts';

/** A gate of OpenQASM 3 `stdgates.inc`: how many qubits and angles (radians) it takes, and its unitary. */
export interface StandardGate {
  qubits: number;
  params: number;
  unitary: (params: readonly number[]) => ComplexSquare;
}

type Entry = [number, number];
const R = Math.SQRT1_2;

function matrix(rows: Entry[][]): ComplexSquare {
  const out = complexSquare(rows.length);
  rows.forEach((row, i) => row.forEach(([re, im], j) => {
    out.re[i * rows.length + j] = re;
    out.im[i * rows.length + j] = im;
  }));
  return out;
}

/** exp(iφ) as [cos φ, sin φ], the same on every engine. */
function phase(angle: number): Entry {
  const [sine, cosine] = sincos(angle) as [number, number];
  return [cosine, sine];
}

function times([a, b]: Entry, [c, d]: Entry): Entry {
  return [a * c - b * d, a * d + b * c];
}

/** OpenQASM 3 U(θ, φ, λ) up to its global phase. */
function u(theta: number, phi: number, lambda: number): ComplexSquare {
  const [c, s] = phase(theta / 2);
  return matrix([
    [[c, 0], times([-s, 0], phase(lambda))],
    [times([s, 0], phase(phi)), times([c, 0], phase(phi + lambda))],
  ]);
}

/** rx, ry, rz: cos(θ/2) − i sin(θ/2)·P. */
function rotation(axis: 'x' | 'y' | 'z', theta: number): ComplexSquare {
  const [c, s] = phase(theta / 2);
  if (axis === 'x') return matrix([[[c, 0], [0, -s]], [[0, -s], [c, 0]]]);
  if (axis === 'y') return matrix([[[c, 0], [-s, 0]], [[s, 0], [c, 0]]]);
  return matrix([[[c, -s], [0, 0]], [[0, 0], [c, s]]]);
}

function diagonal(second: Entry): ComplexSquare {
  return matrix([[[1, 0], [0, 0]], [[0, 0], second]]);
}

/** |0⟩⟨0| ⊗ 1 + |1⟩⟨1| ⊗ V: the first qubit controls. */
function controlled(v: ComplexSquare): ComplexSquare {
  const n = 2 * v.n;
  const out = complexSquare(n);
  for (let i = 0; i < v.n; i++) {
    out.re[i * n + i] = 1;
    for (let j = 0; j < v.n; j++) {
      out.re[(v.n + i) * n + v.n + j] = v.re[i * v.n + j]!;
      out.im[(v.n + i) * n + v.n + j] = v.im[i * v.n + j]!;
    }
  }
  return out;
}

const x = matrix([[[0, 0], [1, 0]], [[1, 0], [0, 0]]]);
const y = matrix([[[0, 0], [0, -1]], [[0, 1], [0, 0]]]);
const z = diagonal([-1, 0]);
const h = matrix([[[R, 0], [R, 0]], [[R, 0], [-R, 0]]]);
const swap = matrix([[[1, 0], [0, 0], [0, 0], [0, 0]], [[0, 0], [0, 0], [1, 0], [0, 0]], [[0, 0], [1, 0], [0, 0], [0, 0]], [[0, 0], [0, 0], [0, 0], [1, 0]]]);

function fixed(qubits: number, unitary: ComplexSquare): StandardGate {
  return { qubits, params: 0, unitary: () => unitary };
}

function angled(qubits: number, params: number, unitary: (p: readonly [number, number, number, number]) => ComplexSquare): StandardGate {
  return { qubits, params, unitary: (p) => unitary([p[0] ?? 0, p[1] ?? 0, p[2] ?? 0, p[3] ?? 0]) };
}

/** Controlled U with a phase γ on the controlled branch (OpenQASM 3 `cu`). */
function controlledU(theta: number, phi: number, lambda: number, gamma: number): ComplexSquare {
  const out = controlled(u(theta, phi, lambda));
  for (let i = 2; i < 4; i++) {
    for (let j = 2; j < 4; j++) {
      const k = i * 4 + j;
      [out.re[k], out.im[k]] = times([out.re[k]!, out.im[k]!], phase(gamma));
    }
  }
  return out;
}

/** OpenQASM 3 language reference, "Standard library" (openqasm.com); checked against its definitions from memory. */
export const standardGates: ReadonlyMap<string, StandardGate> = new Map<string, StandardGate>([
  ['id', fixed(1, diagonal([1, 0]))], ['x', fixed(1, x)], ['y', fixed(1, y)], ['z', fixed(1, z)], ['h', fixed(1, h)],
  ['s', fixed(1, diagonal([0, 1]))], ['sdg', fixed(1, diagonal([0, -1]))], ['t', fixed(1, diagonal([R, R]))], ['tdg', fixed(1, diagonal([R, -R]))],
  ['sx', fixed(1, matrix([[[0.5, 0.5], [0.5, -0.5]], [[0.5, -0.5], [0.5, 0.5]]]))],
  ['p', angled(1, 1, ([a]) => diagonal(phase(a)))], ['phase', angled(1, 1, ([a]) => diagonal(phase(a)))],
  ['rx', angled(1, 1, ([a]) => rotation('x', a))], ['ry', angled(1, 1, ([a]) => rotation('y', a))], ['rz', angled(1, 1, ([a]) => rotation('z', a))],
  ['u', angled(1, 3, ([a, b, c]) => u(a, b, c))], ['U', angled(1, 3, ([a, b, c]) => u(a, b, c))], ['u1', angled(1, 1, ([a]) => diagonal(phase(a)))],
  ['u2', angled(1, 2, ([a, b]) => u(Math.PI / 2, a, b))], ['u3', angled(1, 3, ([a, b, c]) => u(a, b, c))],
  ['cx', fixed(2, controlled(x))], ['CX', fixed(2, controlled(x))], ['cy', fixed(2, controlled(y))], ['cz', fixed(2, controlled(z))], ['ch', fixed(2, controlled(h))],
  ['swap', fixed(2, swap)],
  ['cp', angled(2, 1, ([a]) => controlled(diagonal(phase(a))))], ['cphase', angled(2, 1, ([a]) => controlled(diagonal(phase(a))))],
  ['crx', angled(2, 1, ([a]) => controlled(rotation('x', a)))], ['cry', angled(2, 1, ([a]) => controlled(rotation('y', a)))], ['crz', angled(2, 1, ([a]) => controlled(rotation('z', a)))],
  ['cu', angled(2, 4, ([a, b, c, g]) => controlledU(a, b, c, g))],
  ['ccx', fixed(3, controlled(controlled(x)))], ['cswap', fixed(3, controlled(swap))],
]);
