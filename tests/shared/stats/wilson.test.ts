import { expect, test } from 'vitest';
import { wilsonInterval, Z_95, Z_99 } from '#shared/stats/wilson.ts';

test.each([
  [81, 263, 0.255289, 0.36621],
  [15, 148, 0.062386, 0.160487],
  [0, 20, 0, 0.161125],
])('%i of %i at 95 %%: the values of Statistics in Medicine 17, 857, 1998 (memory, recomputed with scipy)', (k, n, low, high) => {
  const found = wilsonInterval(k, n, Z_95);
  expect(found.low).toBeCloseTo(low, 6);
  expect(found.high).toBeCloseTo(high, 6);
});

test('its ends are the proportions from which k of n lies z standard deviations away', () => {
  for (const [k, n] of [[1900, 2000], [95, 100], [7, 9]] as const) {
    const { low, high } = wilsonInterval(k, n, Z_99);
    for (const p of [low, high]) expect(Math.abs(k - n * p) / Math.sqrt(n * p * (1 - p))).toBeCloseTo(Z_99, 9);
  }
});

test('no trial says nothing; all and none stay inside 0 to 1', () => {
  expect(wilsonInterval(0, 0, Z_99)).toEqual({ low: 0, high: 1 });
  expect(wilsonInterval(20, 20, Z_95).high).toBe(1);
});
