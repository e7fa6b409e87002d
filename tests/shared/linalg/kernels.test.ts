/** The WebAssembly kernels and plain TypeScript must give the same bits: a result may not depend on where it was computed. */
import { describe, expect, test } from 'vitest';
import { compileKernels } from '#api/lib/kernel-source.ts';
import { Cholesky } from '#shared/linalg/cholesky.ts';
import { ColumnStore } from '#shared/linalg/column-store.ts';
import { PanelStore } from '#shared/linalg/panel-store.ts';
import { SparseBuilder } from '#shared/linalg/sparse.ts';
import { SparseProduct } from '#shared/linalg/sparse-product.ts';
import { openArena } from '#shared/linalg/wasm/arena.ts';
import { kernelBase64 } from '#shared/linalg/wasm/kernel-bytes.ts';
import { kernelBytes } from '#shared/linalg/wasm/kernels.ts';
import { Evaluator } from '#shared/method/evaluator.ts';
import { idealGateSet, indexCircuits } from '#shared/method/gate-set.ts';
import { drawCircuits, makeNoisy, one, pairGates, QUARTER, seeded } from '#tests/shared/method/made.ts';
import { product, randomMatrix, transposeOf } from '#tests/shared/linalg/matrices.ts';

function sameBits(a: Float64Array, b: Float64Array): void {
  expect(a.length).toBe(b.length);
  const [x, y] = [new BigUint64Array(a.buffer, a.byteOffset, a.length), new BigUint64Array(b.buffer, b.byteOffset, b.length)];
  for (let i = 0; i < x.length; i++) if (x[i] !== y[i]) throw new Error(`element ${i}: ${a[i]} and ${b[i]}`);
}

test('this engine takes the module, which stays below 5,000 bytes', () => {
  expect(kernelBytes().length).toBeLessThan(5000);
  expect(openArena(8).kernels).not.toBeNull();
  expect(openArena(8, true).kernels).toBeNull();
});

test('the committed bytes are those of the sources: `npm run kernels` after a change', async () => {
  expect(Buffer.from(await compileKernels()).toString('base64')).toBe(kernelBase64);
});

test.each([[7, 5], [16, 40], [43, 311]])('panels of a %i×%i matrix', (m, n) => {
  const g = seeded(`panel ${m}`);
  const [fast, plain] = [new PanelStore(m * n, m + n), new PanelStore(m * n, m + n, true)];
  const [a, x] = [randomMatrix(m, n, g), randomMatrix(2 * (m + n), 4, g)];
  for (const store of [fast, plain]) {
    store.matrix.set(a);
    store.vectors.set(x);
    store.subtract(0, n, 0, m, 0, n, 0, 8 * n);
    store.subtract(0, n, 2, m - 1, 1, n - 2, 4 * n, 8 * n + 4 * m);
    store.subtract(0, n, 0, m, 3, 3, 0, 8 * n);
  }
  sameBits(fast.vectors, plain.vectors);
});

test.each([3, 50, 131])('triangular solutions of order %i', (n) => {
  const g = seeded(`solve ${n}`);
  const x = randomMatrix(n, n + 3, g);
  const a = product(x, transposeOf(x, n, n + 3), n, n + 3, n);
  const right = randomMatrix(18 * n, 4, g);
  const [p, q] = [right.slice(), right.slice()];
  Cholesky.factor(a.slice(), n)!.solve(p, 18);
  Cholesky.factor(a.slice(), n, true)!.solve(q, 18);
  sameBits(p, q);
});

test.each([1, 5, 18])('a sparse product on %i groups, empty rows among them', (groups) => {
  const g = seeded(`sparse ${groups}`);
  const builder = new SparseBuilder(23);
  for (let i = 0; i < 40; i++) builder.push(Float64Array.from({ length: 23 }, () => (i % 7 !== 3 && g.next() < 0.3 ? g.next() - 0.5 : 0)));
  const matrix = builder.build();
  const x = randomMatrix(groups * 23, 4, g);
  const [p, q] = [new Float64Array(groups * 160), new Float64Array(groups * 160)];
  new SparseProduct(matrix).apply(x, p, groups);
  new SparseProduct(matrix, true).apply(x, q, groups);
  sameBits(p, q);
});

describe.each([['one qubit', one('id', ['rx', QUARTER], 'h', 't'), [0]], ['two qubits', pairGates('cz'), [0, 1]]] as const)('%s', (name, gates, qubits) => {
  test('probabilities of circuits', () => {
    const set = idealGateSet(gates, qubits);
    const g = seeded(`evaluate ${name}`);
    const circuits = indexCircuits(set, drawCircuits(gates, [0, 1, 2, 3, 7, 16], 150, g));
    const [fast, plain] = [false, true].map((p) => new Evaluator(circuits, set.gates.length, set.D, set.d - 1, p));
    for (let trial = 0; trial < 3; trial++) {
      const maps = makeNoisy(set, 0.05, 0.02, 0.03, g);
      const [p, q] = [new Float64Array(fast!.rows), new Float64Array(fast!.rows)];
      fast!.run(maps, p);
      plain!.run(maps, q);
      sameBits(p, q);
    }
  });
});

test.each([9, 16, 225])('a matrix of order %i kept by columns', (n) => {
  const g = seeded(`columns ${n}`);
  const [a, x, y] = [randomMatrix(n, n, g), randomMatrix(n, 1, g), randomMatrix(n, 1, g)];
  const [fast, plain] = [new ColumnStore(a, n), new ColumnStore(a, n, true)];
  for (const store of [fast, plain]) {
    store.x.set(x);
    store.out.set(y);
    store.addProduct();
  }
  sameBits(fast.out, plain.out);
  product(a, x, n, n, 1).forEach((v, i) => expect(Math.abs(fast.out[i]! - y[i]! - v)).toBeLessThan(1e-12));
});
