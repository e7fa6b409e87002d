import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { canonicalJson, sha256Hex } from '#shared/formats/canonical-json.ts';
import { littleEndianBytes, readLittleEndian } from '#shared/formats/float64.ts';
import type { Result } from '#shared/formats/types.ts';
import { compareResults } from '#shared/recompute/compare.ts';
import { agreementOf, differencesOf, largestGap } from '#shared/recompute/differences.ts';

const text = readFileSync(new URL('../../../schema/conformance/M1/quarter-turn/result.json', import.meta.url), 'utf8');
const frozen = (): Result => JSON.parse(text) as Result;
const digest = sha256Hex(new TextEncoder().encode(text));
const table = littleEndianBytes(Float64Array.of(0.25, Number.NaN, -0, 1e-300));
const replicates = { sha256: sha256Hex(table), bytes: table };
const register = { register: ['q0'] };
const changed = (change: (result: Result) => void): Result => {
  const result = frozen();
  change(result);
  return result;
};

describe('differences of two JSON values', () => {
  it('are told by pointer, a gap only between numbers', () => {
    expect(differencesOf({ 'a/b': [1, { c: 2 }], d: null }, { 'a/b': [1, { c: 2.5 }], d: 'x' })).toEqual([
      { pointer: '/a~1b/1/c', frozen: 2, again: 2.5, gap: 0.5 }, { pointer: '/d', frozen: null, again: 'x', gap: null },
    ]);
    expect(differencesOf([1, 2], [1])).toEqual([{ pointer: '/1', frozen: 2, again: undefined, gap: null }]);
    expect(differencesOf({ a: 1 }, [1])).toHaveLength(1);
  });

  it('are close up to 1e-9 of max(1, |x|), and never where one side is no number', () => {
    expect(agreementOf([])).toBe('identical');
    expect(agreementOf(differencesOf([0.5], [0.5 + 9e-10]))).toBe('close');
    expect(agreementOf(differencesOf([0.5], [0.5 + 2e-9]))).toBe('differs');
    expect(agreementOf(differencesOf([5000], [5000 + 4e-6]))).toBe('close');
    expect(agreementOf(differencesOf([null], [0]))).toBe('differs');
    expect(largestGap(differencesOf([1, 2, 'a'], [1.5, 4, 'b']))).toBe(2);
  });
});

describe('stored numbers', () => {
  it('come back as they were, and every not-a-number is stored alike', () => {
    expect([...readLittleEndian(table)].map((x) => Object.is(x, -0))).toEqual([false, false, true, false]);
    const odd = new Float64Array(new BigUint64Array([0xfff8000000000001n]).buffer);
    expect(littleEndianBytes(odd)).toEqual(littleEndianBytes(Float64Array.of(Number.NaN)));
  });
});

describe('a frozen result beside a recomputed one', () => {
  it('is identical where every byte is', () => {
    const { agreement, figures, parts, result } = compareResults(frozen(), digest, replicates, { result: frozen(), replicates: table }, register);
    expect([agreement, result.agreement, figures.length]).toEqual(['identical', 'identical', frozen().figures.length]);
    expect([...figures, ...parts].filter((part) => part.agreement !== 'identical')).toEqual([]);
  });

  it('is close where last digits differ, and says by how much', () => {
    const again = changed((r) => (r.figures[3]!.value! += 3e-12));
    const comparison = compareResults(frozen(), digest, replicates, { result: again, replicates: table }, register);
    expect([comparison.agreement, comparison.figures[3]!.agreement, comparison.result.agreement]).toEqual(['close', 'close', 'close']);
    expect(comparison.result.largestGap).toBeCloseTo(3e-12, 14);
  });

  it.each<[string, (r: Result) => void, string]>([
    ['a value', (r) => (r.figures[3]!.value! += 1e-6), 'Retained signal, depth 8'],
    ['the end of an interval', (r) => (r.figures[0]!.intervals![2]!.low -= 1e-3), 'Retained signal, depth 0'],
    ['a reason', (r) => (r.figures[18]!.reason = 'another'), 'Angle error, id'],
    ['a rank', (r) => (r.patches[0]!.rank = 30), 'Design, misfit and error maps of q0'],
    ['the sealed check', (r) => (r.sealedCheck!.passed = false), 'Sealed check'],
    ['a warning', (r) => r.warnings.push('more'), 'Warnings'],
    ['a figure left out', (r) => r.figures.pop(), 'Number of figures'],
    ['a figure added', (r) => r.figures.push(r.figures[0]!), 'Number of figures'],
    ['the number of replicates', (r) => (r.replicates = 1999), 'Method, dataset, replicates, sealed circuits'],
  ])('differs by %s, and names the part', (_, change, title) => {
    const comparison = compareResults(frozen(), digest, replicates, { result: changed(change), replicates: table }, register);
    expect(comparison.agreement).toBe('differs');
    expect([...comparison.figures, ...comparison.parts].filter((part) => part.agreement === 'differs').map((part) => part.title)).toContain(title);
  });

  it('differs where only the recorded digest is wrong', () => {
    expect(compareResults(frozen(), 'f'.repeat(64), replicates, { result: frozen(), replicates: table }, register)).toMatchObject({ agreement: 'differs', result: { agreement: 'differs' } });
  });

  it('compares replicates by digest, and number by number where that differs and they are here', () => {
    const moved = (by: number): Uint8Array => littleEndianBytes(Float64Array.of(0.25 + by, Number.NaN, -0, 1e-300));
    const of = (bytes: Uint8Array | null, again: Uint8Array) => compareResults(frozen(), digest, { sha256: replicates.sha256, bytes }, { result: frozen(), replicates: again }, register).replicates;
    expect(of(null, table)).toMatchObject({ agreement: 'identical', largestGap: null });
    expect(of(null, moved(1e-12))).toMatchObject({ agreement: 'differs', largestGap: null });
    expect(of(table, moved(1e-12)).agreement).toBe('close');
    expect(of(table, moved(0.5))).toMatchObject({ agreement: 'differs', largestGap: 0.5 });
    expect(of(table, table.subarray(8)).agreement).toBe('differs');
    expect(of(table, littleEndianBytes(Float64Array.of(0.25, 0, -0, 1e-300))).agreement).toBe('differs');
  });
});

it('canonical text of a conformance result is what the file holds', () => {
  expect(canonicalJson(frozen())).toBe(text);
});
