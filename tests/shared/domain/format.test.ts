import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { countInWords, decimalsFor, formatBytes, formatCount, formatLevel, formatNumber, formatRange, formatSigned, formatValue, joinWords, minus, narrowSpace } from '#shared/domain/format.ts';

/** Reads a written number back: true minus, narrow spaces away. */
const read = (text: string): number => Number(text.replaceAll(narrowSpace, '').replace(minus, '-').replace('+', ''));
const finite = fc.double({ min: -1e9, max: 1e9, noNaN: true });

describe('how numbers are written', () => {
  it('two significant digits of the standard error decide the decimals, after rounding it', () => {
    for (const [se, decimals] of [[0.0028, 4], [0.0012, 4], [0.00019, 5], [0.0996, 2], [0.0994, 3], [0.99, 2], [1.4, 1], [31, 0], [4500, 0], [0.000077, 6]] as const) expect(decimalsFor(se), String(se)).toBe(decimals);
  });

  it('a standard error of zero, below zero or not a number gives four decimals', () => {
    for (const se of [0, -1, Number.NaN, Number.POSITIVE_INFINITY]) expect(decimalsFor(se)).toBe(4);
  });

  it('decimals never round a standard error to fewer than two digits, nor print more than three', () => {
    fc.assert(fc.property(fc.double({ min: 1e-12, max: 0.9, noNaN: true }), (se) => {
      const shown = se.toFixed(decimalsFor(se)).replace(/^0\.0*/, '').replace('.', '');
      expect(shown.length).toBeGreaterThanOrEqual(2);
      expect(shown.length).toBeLessThanOrEqual(3);
    }));
  });

  it('has a true minus and no sign before a zero', () => {
    expect(formatNumber(-0.0043, 4)).toBe(`${minus}0.0043`);
    expect(formatNumber(-0.00001, 3)).toBe('0.000');
    expect(formatNumber(-0, 1)).toBe('0.0');
  });

  it('parts thousands with a narrow no-break space, not inside the fraction', () => {
    expect(formatCount(230000)).toBe(`230${narrowSpace}000`);
    expect(formatCount(1311)).toBe(`1${narrowSpace}311`);
    expect(formatNumber(1234567.891234, 6)).toBe(`1${narrowSpace}234${narrowSpace}567.891234`);
  });

  it('reads back to within half a unit of the last decimal, for any number', () => {
    fc.assert(fc.property(finite, fc.integer({ min: 0, max: 9 }), (x, decimals) => {
      expect(Math.abs(read(formatNumber(x, decimals)) - x)).toBeLessThanOrEqual(0.5000001 * 10 ** -decimals + Math.abs(x) * 1e-15);
    }));
  });

  it('never shows an ordinary hyphen or an exponent', () => {
    fc.assert(fc.property(finite, fc.integer({ min: 0, max: 15 }), (x, decimals) => {
      expect(formatNumber(x, decimals)).not.toMatch(/-|e/);
    }));
  });

  it('keeps order: a lower number is never written as a higher one', () => {
    fc.assert(fc.property(finite, finite, fc.integer({ min: 0, max: 9 }), (a, b, decimals) => {
      const [low, high] = a < b ? [a, b] : [b, a];
      expect(read(formatNumber(low, decimals))).toBeLessThanOrEqual(read(formatNumber(high, decimals)));
    }));
  });

  it('moves to per cent and thousandths without a rounding of its own', () => {
    expect(formatValue(0.9695, 4, 'percent')).toBe(`96.95${narrowSpace}%`);
    expect(formatValue(0.57, 2, 'percent')).toBe(`57${narrowSpace}%`);
    expect(formatValue(0.00172, 5, 'thousandths')).toBe('1.72');
    expect(formatValue(1.5e-7, 8, 'thousandths')).toBe('0.00015');
    fc.assert(fc.property(fc.integer({ min: -9999, max: 9999 }), (n) => {
      expect(read(formatValue(n / 1e4, 4, 'percent').replace(`${narrowSpace}%`, ''))).toBe(n === 0 ? 0 : n / 100);
    }));
  });

  it('puts "to" between the ends of an interval', () => {
    expect(formatRange(0.9658, 0.9732, 4)).toBe('0.9658 to 0.9732');
    expect(formatRange(-0.0084, -0.0002, 4)).toBe(`${minus}0.0084 to ${minus}0.0002`);
  });

  it('signs differences on both sides and leaves zero unsigned', () => {
    expect([formatSigned(0.03, 2), formatSigned(-0.03, 2), formatSigned(0.001, 2), formatSigned(0, 2)]).toEqual(['+0.03', `${minus}0.03`, '0.00', '0.00']);
  });

  it('writes levels, sizes, lists and small counts in words', () => {
    expect([formatLevel(0.95), formatLevel(0.5), formatLevel(0.995)]).toEqual([`95${narrowSpace}%`, `50${narrowSpace}%`, `99.5${narrowSpace}%`]);
    expect([formatBytes(41_200), formatBytes(999), formatBytes(1_500_000), formatBytes(9_990)]).toEqual(['41 kB', '999 bytes', '1.5 MB', '10 kB']);
    expect([joinWords([]), joinWords(['a']), joinWords(['a', 'b']), joinWords(['a', 'b', 'c'])]).toEqual(['', 'a', 'a and b', 'a, b and c']);
    expect([countInWords(0), countInWords(16), countInWords(21)]).toEqual(['no', 'sixteen', '21']);
  });

  it('names what is not a finite number instead of printing it', () => {
    expect([formatNumber(Number.NaN, 2), formatNumber(Number.POSITIVE_INFINITY, 2)]).toEqual(['not a number', 'infinite']);
  });
});
