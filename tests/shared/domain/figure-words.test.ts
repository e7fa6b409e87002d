import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { columnDecimals, figureDecimals, figureName, figureRange, figureValue, intervalAt } from '#shared/domain/figure-words.ts';
import { formatDate, formatSpan, formatTime } from '#shared/domain/format-date.ts';
import { makeFigure } from '#tests/support/fixtures/figures.ts';

describe('figures in words', () => {
  it('names depth, gate and gate in words', () => {
    expect(figureName({ key: 'retained-signal', depth: 16, gate: null })).toBe('Retained signal, depth 16');
    expect(figureName({ key: 'gate-loss', depth: null, gate: 'a' }, 'rx(π/2)')).toBe('Gate loss, rx(π/2)');
    expect(figureName({ key: 'readout-loss', depth: null, gate: null })).toBe('Readout loss');
  });

  it('prints estimate and 95 % interval with the same digits', () => {
    const figure = makeFigure('retained-signal', 0.9695, 0.00189, { depth: 16 });
    expect(figureValue(figure)).toBe('0.9695');
    expect(figureRange(figure)).toBe('0.9658 to 0.9732');
    expect(figureRange(figure, 0.5)).toBe('0.9682 to 0.9708');
  });

  it('a column has one number of decimals, that of its most exact figure; figures without value do not count', () => {
    const rough = makeFigure('error-per-gate', 0.0123, 0.0021);
    const exact = makeFigure('error-per-gate', 0.00128, 0.000077);
    const none = makeFigure('error-per-gate', null, 0);
    expect([figureDecimals(rough), figureDecimals(exact), columnDecimals([rough, exact, none]), columnDecimals([none])]).toEqual([4, 6, 6, 0]);
  });

  it('no rounding hides a 95 % interval, however the standard error misleads', () => {
    fc.assert(fc.property(fc.double({ min: -1, max: 1, noNaN: true }), fc.double({ min: 1e-9, max: 0.1, noNaN: true }), fc.double({ min: 1e-6, max: 1e3, noNaN: true }), (value, width, misled) => {
      const figure = { ...makeFigure('angle-error', value, width), standardError: width * misled };
      const wide = intervalAt(figure, 0.95);
      if (!wide || wide.low === wide.high) return;
      const [low, high] = (figureRange(figure) ?? '').split(' to ');
      expect(low).not.toBe(high);
    }));
  });

  it('says what is not determined and gives no interval for it', () => {
    const none = makeFigure('angle-error', null, 0);
    expect(figureValue(none)).toBe('Not determined');
    expect(figureRange(none)).toBeNull();
    expect(figureRange({ ...makeFigure('output-error', 0.1, 0.01), intervals: null })).toBeNull();
  });
});

describe('dates', () => {
  it('are written in UTC as 2026-05-04, whatever the offset of the text', () => {
    expect(formatDate('2026-05-04T23:30:00-02:00')).toBe('2026-05-05');
    expect(formatTime('2026-05-04T08:00:00Z')).toBe('2026-05-04, 08:00 UTC');
    expect(formatSpan('2026-05-04T08:00:00Z', '2026-05-04T09:10:00Z')).toBe('2026-05-04 08:00 to 09:10 UTC');
    expect(formatSpan('2026-05-04T23:00:00Z', '2026-05-05T01:00:00Z')).toBe('2026-05-04 23:00 to 2026-05-05 01:00 UTC');
  });
});
