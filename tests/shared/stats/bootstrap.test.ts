/** "An Introduction to the Bootstrap" (1993): values from memory, recomputed by full enumeration; no random number is involved. */
import { expect, test } from 'vitest';
import { percentileInterval, reflectedInterval } from '#shared/stats/bootstrap-intervals.ts';
import { meanTotalVariation } from '#shared/stats/distance.ts';
import { moments } from '#shared/stats/moments.ts';
import { quantileSorted } from '#shared/stats/quantile.ts';

const TREATED = [94, 197, 16, 38, 99, 141, 23];

/** Every one of the 7⁷ resamples. */
function everyResample(statistic: (sample: number[]) => number): Float64Array {
  const out = new Float64Array(7 ** 7);
  const sample = new Array<number>(7).fill(0);
  for (let code = 0; code < out.length; code++) {
    let left = code;
    for (let i = 0; i < 7; i++) {
      sample[i] = TREATED[left % 7]!;
      left = Math.floor(left / 7);
    }
    out[code] = statistic(sample);
  }
  return out.sort();
}

test('the ideal bootstrap standard error of the mean is 23.3635, exact percentiles 43.42857 and 134.42857', () => {
  const means = everyResample((s) => (s[0]! + s[1]! + s[2]! + s[3]! + s[4]! + s[5]! + s[6]!) / 7);
  expect(moments(means).deviation).toBeCloseTo(23.3635, 3);
  const { low, high } = percentileInterval(means, 0.95);
  expect(low).toBeCloseTo(43.42857, 4);
  expect(high).toBeCloseTo(134.42857, 4);
});

test('the ideal bootstrap standard error of the median is 37.8347', () => {
  const medians = everyResample((s) => quantileSorted([...s].sort((a, b) => a - b), 0.5));
  expect(moments(medians).deviation).toBeCloseTo(37.8347, 3);
});

test('type 7 quantiles: numpy’s default on 1, 2, 4, 8 (recomputed with numpy 2.4)', () => {
  const sorted = [1, 2, 4, 8];
  expect([0, 0.025, 0.25, 0.5, 0.6, 0.975, 1].map((q) => quantileSorted(sorted, q))).toEqual([1, 1.075, 1.75, 3, 3.5999999999999996, 7.699999999999999, 8]);
  expect(quantileSorted([5], 0.3)).toBe(5);
});

test('a reflected interval mirrors the quantiles at the estimate and is cut at 0', () => {
  const sorted = Array.from({ length: 101 }, (_, i) => i / 100);
  expect(reflectedInterval(sorted, 0.6, 0.5)).toEqual({ level: 0.5, low: 1.2 - 0.75, high: 1.2 - 0.25 });
  expect(reflectedInterval(sorted, 0.1, 0.5)).toEqual({ level: 0.5, low: 0, high: 0 });
});

test('mean total variation distance: half the sum of absolute differences, averaged over circuits', () => {
  expect(meanTotalVariation(Float64Array.from([1, 0, 0.5, 0.5]), 0, Float64Array.from([0, 1, 0.25, 0.75]), 0, 2, 2)).toBe((1 + 0.25) / 2);
});
