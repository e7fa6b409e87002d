import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { minus } from '#shared/domain/format.ts';
import { linearAxis, logAxis, placedAxis, upright } from '#web/charts/axis.ts';

describe('axes', () => {
  it('a linear axis holds every value it was given, whatever they are', () => {
    fc.assert(fc.property(fc.array(fc.double({ min: -1e6, max: 1e6, noNaN: true }), { minLength: 1, maxLength: 20 }), (values) => {
      const axis = linearAxis(values);
      for (const value of values) {
        expect(axis.at(value)).toBeGreaterThanOrEqual(-0.001);
        expect(axis.at(value)).toBeLessThanOrEqual(100.001);
      }
      for (const tick of axis.ticks) expect(axis.at(tick.value)).toBe(tick.at);
    }));
  });

  it('one value, equal values or none still give an axis of some width', () => {
    for (const values of [[0.97], [0.97, 0.97], [0], [0, 5e-324], [-5e-324], []]) {
      const { domain } = linearAxis(values);
      expect(domain[1]).toBeGreaterThan(domain[0]);
      expect(linearAxis(values).ticks.length).toBeGreaterThan(1);
    }
  });

  it('tick words have a true minus and one number of decimals', () => {
    const labels = linearAxis([-0.012, 0.017], { count: 4 }).ticks.map((t) => t.label);
    expect(labels).toContain(`${minus}0.01`);
    expect(new Set(labels.map((l) => l.split('.')[1]?.length)).size).toBe(1);
  });

  it('an upright axis grows upwards: the highest value lies nearest the top', () => {
    const axis = upright(linearAxis([0, 1], { pad: 0 }));
    expect([axis.at(0), axis.at(1)]).toEqual([100, 0]);
  });

  it('depths lie at log2(1 + depth), so that depth 0 has a place', () => {
    const axis = placedAxis([0, 1, 4, 8, 16, 32, 64], (d) => Math.log2(1 + d), String, 0);
    expect(axis.at(0)).toBe(0);
    expect(axis.at(1)).toBeCloseTo(100 / Math.log2(65), 2);
    expect(axis.at(64)).toBe(100);
  });

  it('a logarithmic axis names 1, 2 and 5 times powers of ten inside its range', () => {
    expect(logAxis([20_000, 2e6], String).ticks.map((t) => t.value)).toEqual([20_000, 50_000, 100_000, 200_000, 500_000, 1e6, 2e6]);
  });
});
