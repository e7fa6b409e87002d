import { describe, expect, test } from 'vitest';
import { nearestChannel } from '#shared/opinions/positive.ts';
import { choiRealForm, mapFromChoi, smallestChoiEigenvalue } from '#shared/quantum/choi.ts';
import { normal, seeded } from '../method/made.ts';
import reference from '#tests/reference/opinions/nearest-channel.json' with { type: 'json' };

const apart = (a: Float64Array, b: ArrayLike<number>): number => Math.sqrt(a.reduce((s, v, i) => s + (v - b[i]!) ** 2, 0));

/** A map near the identity with noise in every entry but the first row: trace preserving, hardly ever positive. */
function rough(n: number, size: number, seed: string): Float64Array {
  const D = 4 ** n;
  const generator = seeded(seed);
  return Float64Array.from({ length: D * D }, (_, i) => (i < D ? (i === 0 ? 1 : 0) : (i % (D + 1) === 0 ? 1 : 0) + size * normal(generator)));
}

describe('Choi matrix', () => {
  test.each([1, 2])('%i qubits: the way there and back gives the map again', (n) => {
    const map = rough(n, 0.3, 'choi');
    expect(apart(mapFromChoi(choiRealForm(map, n), n), map)).toBeLessThan(1e-14 * 4 ** n);
  });
});

describe('the nearest completely positive, trace-preserving map', () => {
  test.each([[1, 0.1], [1, 1e-3], [2, 0.03]])('%i qubits, entries off by %f: Choi eigenvalues at least −1e-12, first row exactly (1, 0, …)', (n, size) => {
    const D = 4 ** n;
    const found = nearestChannel(rough(n, size, `rough ${n}`), n);
    expect(smallestChoiEigenvalue(found, n)).toBeGreaterThanOrEqual(-1e-12);
    expect([...found.subarray(0, D)]).toEqual([1, ...new Array<number>(D - 1).fill(0)]);
  });

  test('a channel on the edge (amplitude damping 0.19: two Choi eigenvalues are 0) is its own nearest one, to 1e-12', () => {
    const damping = Float64Array.from([1, 0, 0, 0, 0, 0.9, 0, 0, 0, 0, 0.9, 0, 0.19, 0, 0, 0.81]);
    expect(apart(nearestChannel(damping, 1), damping)).toBeLessThan(1e-12);
  });

  test('twice is once', () => {
    const once = nearestChannel(rough(1, 0.1, 'twice'), 1);
    expect(apart(nearestChannel(once, 1), once)).toBeLessThan(1e-9);
  });

  test(`agrees with ${reference.tool} (${reference.how})`, () => {
    for (const { map, nearest, n } of reference.cases) expect(apart(nearestChannel(Float64Array.from(map), n), nearest)).toBeLessThan(2e-6);
  });
});
