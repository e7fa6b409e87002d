import { describe, expect, it } from 'vitest';
import { driftDrawing } from '#web/charts/drift-data.ts';
import { plannerDrawing, shortCount } from '#web/charts/planner-data.ts';

describe('misfit by block', () => {
  const blocks = [{ block: 1, sigmas: 0.4, circuits: 30 }, { block: 2, sigmas: -2.7, circuits: 29 }, { block: 5, sigmas: 2.58, circuits: 31 }];
  const drawing = driftDrawing(blocks);

  it('marks a block beyond 2.58 standard deviations on either side, and not at 2.58', () => {
    expect(drawing.points.map((p) => p.outside)).toEqual([false, true, false]);
    expect(drawing.says).toContain('One lies outside it here.');
  });

  it('numbers in the chart are the numbers in its table', () => {
    expect(drawing.table.rows.map((row) => row.map((c) => c.raw))).toEqual(blocks.map((b) => [b.block, b.sigmas, b.circuits]));
    expect(drawing.points.map((p) => p.sigmas)).toEqual(blocks.map((b) => b.sigmas));
  });

  it('blocks follow each other evenly, whatever their numbers', () => {
    const at = drawing.points.map((p) => drawing.x.at(p.block));
    expect((at[1] ?? 0) - (at[0] ?? 0)).toBeCloseTo((at[2] ?? 0) - (at[1] ?? 0), 2);
  });

  it('a single block can be drawn', () => {
    expect(driftDrawing([{ block: 1, sigmas: 9, circuits: 3 }]).y.domain[1]).toBeGreaterThanOrEqual(9);
  });
});

describe('what certainty costs', () => {
  const curve = { name: 'plan', main: true, points: [{ shots: 1e6, halfWidth: 0.0018 }, { shots: 1e4, halfWidth: 0.018 }] };
  const drawing = plannerDrawing([curve], [{ shots: 2e5, halfWidth: 0.004 }], 0.001);

  it('a law of one over the root of shots is a straight line on both logarithmic axes', () => {
    const y = (shots: number): number => drawing.y.at(1.8 / Math.sqrt(shots));
    expect(y(1e5) - y(1e4)).toBeCloseTo(y(1e6) - y(1e5), 2);
  });

  it('holds the wanted width inside the plot and names the curve at its right end', () => {
    expect(drawing.y.at(0.001)).toBeLessThanOrEqual(100);
    expect(drawing.curves[0]?.end.x).toBe(100);
  });

  it('numbers in the chart are the numbers in its table', () => {
    expect(drawing.table.rows.map((row) => [row[1]?.raw, row[2]?.raw])).toEqual(curve.points.map((p) => [p.shots, p.halfWidth]));
  });

  it('shortens shots for the axis', () => {
    expect([5000, 20_000, 250_000, 1e6, 1.5e6].map(shortCount)).toEqual(['5\u202f000', '20 k', '250 k', '1 M', '1.5 M']);
  });
});
