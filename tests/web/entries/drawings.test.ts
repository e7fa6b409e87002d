import { describe, expect, it } from 'vitest';
import { intervalAt } from '#shared/domain/figure-words.ts';
import { depthDrawing } from '#web/features/entries/depth-data.ts';
import { angleNotes, fileTitle, headlineOf, misfitNotes } from '#web/features/entries/entry-words.ts';
import { gateFigures } from '#web/features/entries/gate-rows.ts';
import { sealedDrawing } from '#web/features/entries/sealed-data.ts';
import { entryFixture } from '#tests/support/fixtures/entries.ts';
import { makeFigure } from '#tests/support/fixtures/figures.ts';

const retained = entryFixture.figures.filter((f) => f.key === 'retained-signal');

describe('retained signal against depth', () => {
  const drawing = depthDrawing([...entryFixture.figures].reverse(), 16);

  it('numbers in the chart are the numbers in its table, by rising depth', () => {
    expect(drawing?.table.rows.map((row) => [row[0]?.raw, row[1]?.raw])).toEqual(retained.map((f) => [f.depth, f.value]));
    expect(drawing?.points.map((p) => p.text)).toEqual(drawing?.table.rows.map((row) => row[1]?.text));
    drawing?.points.forEach((p, i) => expect(p.y).toBe(drawing.y.at(retained[i]?.value ?? Number.NaN)));
  });

  it('the widest band is edged by the ends of the 95 % intervals', () => {
    const [first] = retained;
    const ends = first ? intervalAt(first, 0.95) : null;
    const starts = drawing?.bands.find((b) => b.level === 0.95)?.edges.map((edge) => Number(/^M[\d.]+,([\d.]+)/.exec(edge)?.[1]));
    expect(starts).toEqual([drawing?.y.at(ends?.low ?? 0), drawing?.y.at(ends?.high ?? 0)].map((v) => Number(v?.toFixed(3))));
  });

  it('extrapolation begins at twice the longest circuit of the estimate, and nowhere where nothing lies beyond', () => {
    expect(drawing?.farFrom).toBe(drawing?.x.at(32));
    expect(depthDrawing(entryFixture.figures, 32)?.farFrom).toBeNull();
    expect(drawing?.points.filter((p) => p.extrapolated).map((p) => p.depth)).toEqual([64]);
  });

  it('every point reads out depth, value and interval', () => {
    expect(drawing?.points[4]?.label).toBe('Depth 16: 0.9695, 95 % interval 0.9658 to 0.9732');
  });

  it('draws no bands where a depth has no interval, and nothing for a single depth', () => {
    const bare = retained.map((f, i) => (i === 2 ? { ...f, intervals: null } : f));
    expect(depthDrawing(bare, 16)?.bands).toEqual([]);
    expect(depthDrawing(retained.slice(0, 1), 16)).toBeNull();
  });
});

describe('sealed circuits', () => {
  const points = entryFixture.sealedPoints;
  const drawing = sealedDrawing(points);

  it('what is left over is observed minus predicted, in the chart and in the table', () => {
    expect(drawing.points.map((p) => p.left)).toEqual(points.map((p) => p.observed - p.predicted));
    expect(drawing.table.rows.map((row) => row[6]?.raw)).toEqual(points.map((p) => p.observed - p.predicted));
  });

  it('the grey range is 1.96 standard deviations of a share at 1 000 shots', () => {
    const top = drawing.residual.y.at(1.959963984540054 * Math.sqrt(0.25 / 1000));
    expect(drawing.ellipse.upper).toContain(`L50 ${top}`);
    expect(drawing.ellipseTop).toBe(top);
  });

  it('counts points outside by the shots of each circuit, and a prediction beyond [0, 1] as certain', () => {
    const at = (predicted: number, observed: number, shots: number) => ({ id: 'x', length: 2, shots, outcome: '0', predicted, observed });
    expect(sealedDrawing([at(0.5, 0.54, 1000), at(0.5, 0.54, 100), at(1.002, 1, 1000)]).points.map((p) => p.outside)).toEqual([true, false, true]);
  });
});

describe('gate figures', () => {
  it('keeps the order of the gates, shares one axis a figure, and keeps zero on it', () => {
    const { rows, loss, angle } = gateFigures(entryFixture);
    expect(rows.map((row) => row.words)).toEqual(['identity', 'rx(π/2)', 'ry(π/2)']);
    expect(rows[0]?.angle?.value).toBeNull();
    expect([loss.axis.at(0), angle.axis.at(0)].every((at) => at >= 0 && at <= 100)).toBe(true);
    expect(loss.axis.ticks.map((t) => t.label)).toContain('0.5');
  });

  it('speaks of an angle only where its 95 % interval leaves out zero, and says the direction', () => {
    expect(angleNotes(entryFixture).map((n) => `${n.gate} ${n.sentence}`)).toEqual([
      'rx(π/2) turns too far. Its angle error is 0.0121 rad and its 95\u202f% interval leaves out zero.',
      'ry(π/2) turns too little. Its angle error is \u22120.0043 rad and its 95\u202f% interval leaves out zero.',
    ]);
    const wide = { ...entryFixture, figures: [makeFigure('angle-error', 0.003, 0.0021, { gate: 'a' })] };
    expect(angleNotes(wide)).toEqual([]);
  });

  it('draws angles together where there are more than three, and names the gates', () => {
    const gates = ['a', 'b', 'c', 'd'].map((label, q) => ({ label, words: 'rx(π/2)', targets: [q] }));
    const entry = { ...entryFixture, register: ['q0', 'q1', 'q2', 'q3'], gates, figures: gates.map(({ label }, q) => makeFigure('angle-error', q === 3 ? -0.012 : 0.012, 0.001, { gate: label })) };
    expect(angleNotes(entry).map((n) => `${n.gate} ${n.sentence}`)).toEqual([
      'rx(π/2) on q0, rx(π/2) on q1 and rx(π/2) on q2 turn too far: the 95\u202f% intervals of their angle errors leave out zero.',
      'rx(π/2) on q3 turns too little: the 95\u202f% interval of its angle error leaves out zero.',
    ]);
  });

  it('says the misfit of many patches in one sentence, and of each that is out of range in its own', () => {
    const [patch] = entryFixture.patches;
    const patches = [-0.4, 1.2, 0.3, -1.5, 3.1].map((sigmas, q) => ({ ...patch!, qubits: [q], misfit: { ...patch!.misfit!, sigmas } }));
    expect(misfitNotes({ patches, register: ['q0', 'q1', 'q2', 'q3', 'q4'] })).toEqual([
      ' of four of the five patches, over the circuits of the estimate: from \u22121.5 to +1.2 standard deviations from what the estimate leads one to expect. No sign of drift.',
      ' of q4 over the circuits of the estimate: +3.1 standard deviations from what the estimate leads one to expect. Outside the 99 % range: drift, leakage, crosstalk, or counts that are not counts.',
    ]);
    expect(misfitNotes({ patches: patches.slice(0, 1), register: ['q0'] })[0]).toMatch(/^ over the circuits of the estimate: \u22120\.4/);
  });
});

describe('headline sentence', () => {
  it('gives estimate and interval in per cent, and nothing where there is no value', () => {
    const headline = headlineOf(entryFixture);
    expect(`${headline?.before}${headline?.value}${headline?.after}`).toBe('After sixteen gates, Meadow-5 keeps 96.95\u202f% of the ideal signal, with a 95\u202f% interval from 96.58\u202f% to 97.32\u202f%.');
    expect(headlineOf({ ...entryFixture, headline: makeFigure('retained-signal', null, 0) })).toBeNull();
  });

  it('a drawing that leaves the page says what it shows and that the device is invented', () => {
    expect(fileTitle(entryFixture, 'retained signal by depth')).toBe('Meadow-5, EVB-000042.2: retained signal by depth (demonstration data)');
    expect(fileTitle({ ...entryFixture, demo: false }, 'x')).toBe('Meadow-5, EVB-000042.2: x');
  });
});
