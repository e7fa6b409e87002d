/**
 * Outside reference: tests/reference/m1, expected estimates computed with an independent numpy implementation of the method.
 */
import { describe, expect, test } from 'vitest';
import type { Figure, Result } from '#shared/formats/types.ts';
import { estimate } from '#shared/method/estimate.ts';
import { workedExample } from '#tests/shared/method/worked-example.ts';

const WITHIN = 1e-9;

function figure(result: Result, key: string, gate: string | null = null): Figure {
  const found = result.figures.find((f) => f.key === key && f.gate === gate);
  if (!found) throw new Error(`no figure ${key} ${gate}`);
  return found;
}

describe.each([
  ['quarter', 2000], ['clifford', 2000], ['half', 400], ['one-length', 400], ['pair', 8], ['odd-pair', 8],
] as const)('worked example %s', (name, replicates) => {
  const { dataset, circuits, expected, contentId } = workedExample(name);
  const { result } = estimate({ dataset, contentId, gateClass: null, predict: circuits, replicates });
  const patch = result.patches[0]!;

  test('rank, columns and condition ratio agree to 1e-9', () => {
    expect(patch.rank).toBe(expected.rank);
    expect(patch.columns).toBe(expected.columns);
    expect(Math.abs(patch.conditionRatio / expected.conditionRatio - 1)).toBeLessThan(WITHIN);
  });

  test('every prediction agrees to 1e-9, and the same ones are not determined', () => {
    const wanted = Object.entries(expected.predictions);
    expect(result.predictions.length).toBe(wanted.length);
    for (const prediction of result.predictions) {
      const want = expected.predictions[prediction.id] ?? null;
      expect(prediction.determined).toBe(want !== null);
      if (want === null) {
        expect(prediction.probabilities).toBeNull();
        continue;
      }
      for (const [outcome, p] of Object.entries(want)) expect(Math.abs(prediction.probabilities![outcome]! - p)).toBeLessThan(WITHIN);
    }
  });

  test('gate loss and error per gate agree to 1e-9, or are not determined where the reference says so', () => {
    for (const [gate, loss] of Object.entries(expected.gateLoss ?? {})) expect(Math.abs(figure(result, 'gate-loss', gate).value! - loss)).toBeLessThan(WITHIN);
    if (expected.errorPerGate !== undefined) expect(Math.abs(figure(result, 'error-per-gate').value! - expected.errorPerGate)).toBeLessThan(WITHIN);
    for (const key of expected.notDetermined ?? []) {
      for (const f of result.figures.filter((g) => g.key === key)) {
        expect(f.value).toBeNull();
        expect(f.determined).toBe(false);
        expect(f.reason).toMatch(/not de/);
      }
    }
  });

  test('standard errors within 7 %, each 95 % end within a quarter of a standard error', () => {
    for (const [gate, want] of Object.entries(expected.intervals ?? {})) {
      const f = gate === 'errorPerGate' ? figure(result, 'error-per-gate') : figure(result, 'gate-loss', gate);
      expect(Math.abs(f.standardError! / want.standardError - 1)).toBeLessThan(0.07);
      const interval = f.intervals!.find((i) => i.level === 0.95)!;
      expect(Math.abs(interval.low - want.low95)).toBeLessThan(want.standardError / 4);
      expect(Math.abs(interval.high - want.high95)).toBeLessThan(want.standardError / 4);
    }
  });
});
