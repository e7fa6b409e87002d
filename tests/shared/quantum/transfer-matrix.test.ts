/** Outside values: the project's list of check values (recomputed with numpy and QuTiP where it says so). */
import { describe, expect, test } from 'vitest';
import { smallestChoiEigenvalue } from '#shared/quantum/choi.ts';
import { complexFromRows, polishUnitary, unitarityDefect } from '#shared/quantum/complex-matrix.ts';
import { idealTransferMatrix, idealUnitary } from '#shared/quantum/ideal-gate.ts';
import { standardGates } from '#shared/quantum/standard-gates.ts';
import { embedTransferMatrix } from '#shared/quantum/transfer-matrix.ts';

const QUARTER = Math.PI / 2;
const LETTERS = ['I', 'X', 'Y', 'Z'];

function name(index: number, n: number): string {
  return Array.from({ length: n }, (_, q) => LETTERS[(index >> (2 * (n - 1 - q))) & 3]!).join('');
}

/** Where a Pauli goes under a Clifford gate: "-XY". */
function image(gate: string, pauli: string, params: number[] = []): string {
  const n = pauli.length;
  const D = 4 ** n;
  const g = idealTransferMatrix({ gate, params });
  const b = Array.from({ length: D }, (_, i) => i).find((i) => name(i, n) === pauli)!;
  const hits = Array.from({ length: D }, (_, a) => a).filter((a) => g[a * D + b] !== 0);
  expect(hits.length).toBe(1);
  return `${g[hits[0]! * D + b] === -1 ? '-' : ''}${name(hits[0]!, n)}`;
}

describe('transfer matrices of Clifford gates are exact signed permutations', () => {
  test('rx(π/2): X→X, Y→Z, Z→−Y; h: X↔Z, Y→−Y', () => {
    expect(['X', 'Y', 'Z'].map((p) => image('rx', p, [QUARTER]))).toEqual(['X', 'Z', '-Y']);
    expect(['X', 'Y', 'Z'].map((p) => image('h', p))).toEqual(['Z', '-Y', 'X']);
  });

  test('ry(π/2) has the lower block [[0, 0, 1], [0, 1, 0], [−1, 0, 0]]', () => {
    expect(Array.from(idealTransferMatrix({ gate: 'ry', params: [QUARTER] })).map((v) => v + 0)).toEqual([1, 0, 0, 0, 0, 0, 0, 1, 0, 0, 1, 0, 0, -1, 0, 0]);
  });

  test('cx, first qubit controls', () => {
    const want = { IX: 'IX', IY: 'ZY', IZ: 'ZZ', XI: 'XX', XX: 'XI', XY: 'YZ', XZ: '-YY', YI: 'YX', YX: 'YI', YY: '-XZ', YZ: 'XY', ZI: 'ZI' };
    for (const [from, to] of Object.entries(want)) expect(image('cx', from)).toBe(to);
  });

  test('cz: IX→ZX, XI→XZ, XX→YY, XY→−YX', () => {
    for (const [from, to] of Object.entries({ IX: 'ZX', XI: 'XZ', XX: 'YY', XY: '-YX' })) expect(image('cz', from)).toBe(to);
  });

  test('t turns by π/4 about Z', () => {
    const g = idealTransferMatrix({ gate: 't' });
    const r = Math.SQRT1_2;
    [1, 0, 0, 0, 0, r, -r, 0, 0, r, r, 0, 0, 0, 0, 1].forEach((v, i) => expect(g[i]).toBeCloseTo(v, 15));
  });
});

test('every standard gate is unitary and its transfer matrix orthogonal with first row and column (1, 0, …)', () => {
  for (const [gate, { params, qubits }] of standardGates) {
    const ideal = { gate, params: [0.3, -1.1, 2.2, 0.7].slice(0, params) };
    expect(unitarityDefect(idealUnitary(ideal))).toBeLessThan(1e-15);
    const D = 4 ** qubits;
    const g = idealTransferMatrix(ideal);
    for (let i = 0; i < D; i++) {
      expect([g[i], g[i * D]]).toEqual(i === 0 ? [1, 1] : [0, 0]);
      for (let j = 0; j < D; j++) {
        let dot = 0;
        for (let k = 0; k < D; k++) dot += g[i * D + k]! * g[j * D + k]!;
        expect(Math.abs(dot - (i === j ? 1 : 0))).toBeLessThan(1e-14);
      }
    }
  }
});

test('gates that are the same by definition have the same transfer matrix', () => {
  const same: [string, number[], string, number[]][] = [
    ['s', [], 'p', [QUARTER]], ['sdg', [], 'p', [-QUARTER]], ['t', [], 'rz', [Math.PI / 4]], ['tdg', [], 'u1', [-Math.PI / 4]], ['sx', [], 'rx', [QUARTER]],
    ['x', [], 'u3', [Math.PI, 0, Math.PI]], ['h', [], 'u2', [0, Math.PI]], ['ry', [0.4], 'U', [0.4, 0, 0]], ['rx', [0.4], 'u', [0.4, -QUARTER, QUARTER]],
    ['cz', [], 'cp', [Math.PI]], ['cx', [], 'cu', [Math.PI, 0, Math.PI, 0]], ['cy', [], 'cu', [Math.PI, QUARTER, QUARTER, 0]], ['crz', [0.9], 'cu', [0, 0, 0.9, -0.45]],
  ];
  for (const [a, pa, b, pb] of same) {
    const [ga, gb] = [idealTransferMatrix({ gate: a, params: pa }), idealTransferMatrix({ gate: b, params: pb })];
    ga.forEach((v, i) => expect(Math.abs(v - gb[i]!)).toBeLessThan(1e-14));
  }
});

test('embedding: targets [1, 0] of cx make the second qubit control; a one-qubit gate leaves the other alone', () => {
  const swap = idealTransferMatrix({ gate: 'swap' });
  const cx = idealTransferMatrix({ gate: 'cx' });
  const turned = embedTransferMatrix(cx, [1, 0], 2);
  for (let a = 0; a < 16; a++) {
    for (let b = 0; b < 16; b++) {
      let s = 0;
      for (let i = 0; i < 16; i++) for (let j = 0; j < 16; j++) s += swap[a * 16 + i]! * cx[i * 16 + j]! * swap[j * 16 + b]!;
      expect(turned[a * 16 + b]! + 0).toBe(s + 0);
    }
  }
  const second = embedTransferMatrix(idealTransferMatrix({ gate: 'h' }), [1], 2);
  // X⊗Z → X⊗X: index of XX is 5, of XZ 7.
  expect(second[5 * 16 + 7]).toBe(1);
});

test('a unitary typed with ten digits gives a transfer matrix orthogonal to 1e-15', () => {
  const r = 0.7071067812;
  const u = polishUnitary(complexFromRows([[[r, 0], [r, 0]], [[r, 0], [-r, 0]]]));
  expect(unitarityDefect(u)).toBeLessThan(1e-15);
  const g = idealTransferMatrix({ unitary: [[[r, 0], [r, 0]], [[r, 0], [-r, 0]]] });
  expect(Array.from(g).map((v) => v + 0)).toEqual(Array.from(idealTransferMatrix({ gate: 'h' })).map((v) => v + 0));
});

test('an unknown gate or a wrong number of angles is named', () => {
  expect(() => idealTransferMatrix({ gate: 'foo' })).toThrow('"foo" is not an OpenQASM 3 standard gate');
  expect(() => idealTransferMatrix({ gate: 'rx', params: [] })).toThrow('"rx" takes 1 angles, not 0');
});

describe('fidelities: F_avg = (d·F_e + 1)/(d + 1), F_e = tr(R_idealᵀR)/d² (Phys. Lett. A 303, 249, 2002; memory)', () => {
  const entanglement = (r: Float64Array, ideal: Float64Array) => r.reduce((s, v, i) => s + v * ideal[i]!, 0) / Math.sqrt(r.length);
  const average = (fe: number, d: number) => (d * fe + 1) / (d + 1);

  test('depolarising p: 1 − F_avg = p(d − 1)/d; its smallest Choi eigenvalue is p/D', () => {
    for (const n of [1, 2]) {
      const [d, D, p] = [2 ** n, 4 ** n, 0.08];
      const r = new Float64Array(D * D);
      for (let a = 0; a < D; a++) r[a * D + a] = a === 0 ? 1 : 1 - p;
      const id = embedTransferMatrix(idealTransferMatrix({ gate: 'id' }), [0], n);
      expect(1 - average(entanglement(r, id), d)).toBeCloseTo((p * (d - 1)) / d, 14);
      expect(smallestChoiEigenvalue(r, n)).toBeCloseTo(p / D, 13);
    }
  });

  test('amplitude damping 0.1: F_avg = 0.9662277660168379 (QuTiP agrees); completely positive with a zero eigenvalue', () => {
    const g = 0.1;
    const r = Float64Array.from([1, 0, 0, 0, 0, Math.sqrt(1 - g), 0, 0, 0, 0, Math.sqrt(1 - g), 0, g, 0, 0, 1 - g]);
    expect(average(entanglement(r, idealTransferMatrix({ gate: 'id' })), 2)).toBeCloseTo(0.9662277660168379, 14);
    expect(Math.abs(smallestChoiEigenvalue(r, 1))).toBeLessThan(1e-14);
  });

  test('over-rotation θ = 0.1 of one qubit: 1 − F_avg = 1.66527824066e-3, 1 − F_e = sin²(θ/2)', () => {
    const fe = entanglement(idealTransferMatrix({ gate: 'rx', params: [0.1] }), idealTransferMatrix({ gate: 'id' }));
    expect(1 - average(fe, 2)).toBeCloseTo(1.66527824066e-3, 14);
    expect(1 - fe).toBeCloseTo(Math.sin(0.05) ** 2, 15);
  });

  test('ZZ over-rotation θ = 0.05: 1 − F_avg = 4.99895842013e-4', () => {
    const [c, s] = [Math.cos(0.025), Math.sin(0.025)];
    const unitary = [1, -1, -1, 1].map((sign, i) => Array.from({ length: 4 }, (_, j): [number, number] => (i === j ? [c, -sign * s] : [0, 0])));
    const id = embedTransferMatrix(idealTransferMatrix({ gate: 'id' }), [0], 2);
    expect(1 - average(entanglement(idealTransferMatrix({ unitary }), id), 4)).toBeCloseTo(4.99895842013e-4, 14);
  });

  test('the transpose map is not completely positive: smallest Choi eigenvalue −1/2 (memory: partial transpose of a Bell state)', () => {
    expect(smallestChoiEigenvalue(Float64Array.from([1, 0, 0, 0, 0, 1, 0, 0, 0, 0, -1, 0, 0, 0, 0, 1]), 1)).toBeCloseTo(-0.5, 14);
  });
});
