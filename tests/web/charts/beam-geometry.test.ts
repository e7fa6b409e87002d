import { describe, expect, it } from 'vitest';
import { linearAxis } from '#web/charts/axis.ts';
import { beamExtent, beamParts, dotWidth } from '#web/charts/beam-geometry.ts';
import { makeFigure } from '#tests/support/fixtures/figures.ts';

/** An axis from 0 to 1: value and per cent differ by a factor of 100. */
const axis = linearAxis([0, 1], { pad: 0 });
const parts = (value: number, se: number, plotWidth = 1000) => {
  const figure = makeFigure('retained-signal', value, se);
  return beamParts(figure.value, figure.intervals, axis, plotWidth);
};

describe('the beam', () => {
  it('draws line, bar and block for 95, 80 and 50 % at 2, 5 and 10 px, widest first', () => {
    expect(parts(0.5, 0.1).bars.map(({ level, height }) => [level, height])).toEqual([[0.95, 2], [0.8, 5], [0.5, 10]]);
  });

  it('draws every end of an interval that is not symmetric where it is', () => {
    const { bars, dot } = beamParts(0.4, [{ level: 0.5, low: 0.35, high: 0.6 }, { level: 0.8, low: 0.3, high: 0.7 }, { level: 0.95, low: 0.1, high: 0.9 }], axis, 1000);
    expect(bars.map(({ from, width }) => [from, width])).toEqual([[10, 80], [30, 40], [35, 25]]);
    expect(dot).toBe(40);
  });

  it('leaves out a block that is narrower than the dot, and only the block', () => {
    const wide = parts(0.5, 0.01, 1000); // block of 13.5 px
    const narrow = parts(0.5, 0.01, 600); // block of 8.1 px
    expect(wide.bars).toHaveLength(3);
    expect(narrow.bars.map((bar) => bar.level)).toEqual([0.95, 0.8]);
    expect(((wide.bars[2]?.width ?? 0) / 100) * 1000).toBeGreaterThan(dotWidth);
  });

  it('runs over the edge by 2 % of the plot where it passes the axis, and is never cut inside it', () => {
    const { bars } = parts(0.02, 0.1);
    expect(bars[0]?.from).toBe(-2);
    expect((bars[0]?.from ?? 0) + (bars[0]?.width ?? 0)).toBeCloseTo(21.6, 1);
  });

  it('draws the dot alone where there is no interval, and nothing where there is no estimate', () => {
    expect(beamParts(0.3, null, axis, 500)).toEqual({ dot: 30, bars: [] });
    expect(beamParts(null, null, axis, 500)).toEqual({ dot: null, bars: [] });
  });

  it('extent for a common axis: estimates and ends of 95 % intervals, nothing of figures without value', () => {
    const values = beamExtent([makeFigure('readout-loss', 0.5, 0.1), makeFigure('readout-loss', null, 0), { value: 0.9, intervals: null }]);
    expect(values.map((v) => Number(v.toFixed(3)))).toEqual([0.5, 0.304, 0.696, 0.9]);
  });
});
