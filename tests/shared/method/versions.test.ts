import { describe, expect, test } from 'vitest';
import { gateClassById } from '#shared/domain/gate-classes.ts';
import { canonicalJson } from '#shared/formats/canonical-json.ts';
import type { Dataset } from '#shared/formats/types.ts';
import { estimate } from '#shared/method/estimate.ts';
import { idealGateSet } from '#shared/method/gate-set.ts';
import { poseProblem } from '#shared/method/patch-problem.ts';
import { runPasses } from '#shared/method/passes.ts';
import { findMethod, methodVersions, officialMethod, requireMethod } from '#shared/method/versions.ts';
import { lineGates, linePatches, makeRegister } from './chain/made-register.ts';
import { dataset, drawCircuits, drawCounts, makeNoisy, seeded, slowProbabilities } from './made.ts';

const quarter = gateClassById('quarter-turn-1q/1')!;

/** One qubit under noise of a chosen strength, half of it coherent. */
function made(text: string, noise: number): Dataset {
  const g = seeded(text);
  const set = idealGateSet(quarter.gates, [0]);
  const circuits = drawCircuits(quarter.gates, quarter.lengths, 300, g);
  const counts = drawCounts(circuits, slowProbabilities(set, makeNoisy(set, noise, noise, 0.01, g), circuits), 1, 1000, g);
  return dataset(quarter.gates, counts, quarter.id);
}

const bytes = (input: Dataset, method?: string, replicates = 30): { result: string; replicates: number[] } => {
  const made = estimate({ dataset: input, contentId: 'ab'.repeat(32), gateClass: quarter, replicates, ...(method === undefined ? {} : { method }) });
  return { result: canonicalJson(made.result), replicates: [...made.replicates.values] };
};

describe('method versions', () => {
  test('have ids as the result schema takes them, each once, and M1 in eight passes is the only official one', () => {
    expect(new Set(methodVersions.map((v) => v.id)).size).toBe(methodVersions.length);
    for (const { id } of methodVersions) expect(id).toMatch(/^M[1-9][0-9]{0,3}$/);
    expect(methodVersions.filter((v) => v.status === 'official').map((v) => [v.id, v.passes])).toEqual([['M1', 8]]);
    expect(officialMethod.id).toBe('M1');
    expect(findMethod('M2')).toMatchObject({ status: 'draft', passes: 16 });
  });

  test('that this build does not have are refused by name, with the list of those it has', () => {
    expect(findMethod('M9')).toBeNull();
    expect(() => requireMethod('M9')).toThrow('"M9" is not a method version of this build, which has M1, M2.');
    expect(() => estimate({ dataset: made('refused', 0.002), contentId: '00'.repeat(32), gateClass: quarter, replicates: 1, method: 'M9' })).toThrow(RangeError);
  });
});

describe('an estimate by version', () => {
  const weak = made('weak noise', 0.002);

  test('is M1 to the byte where no version is named', () => {
    expect(bytes(weak)).toEqual(bytes(weak, 'M1'));
  });

  test('carries its version and draws other random numbers, from a seed that names the version', () => {
    const [first, second] = [bytes(weak, 'M1'), bytes(weak, 'M2')];
    expect(JSON.parse(first.result)).toMatchObject({ method: 'M1' });
    expect(JSON.parse(second.result)).toMatchObject({ method: 'M2' });
    const shared = first.replicates.filter((v, i) => Number.isFinite(v) && v === second.replicates[i]);
    expect(shared).toEqual([]);
  });

  test('gives the same estimate from both where the passes have settled: to a hundredth of the standard error', () => {
    const [first, second] = ['M1', 'M2'].map((method) => estimate({ dataset: weak, contentId: 'ab'.repeat(32), gateClass: quarter, replicates: 200, method }).result.figures);
    for (const [i, figure] of first!.entries()) {
      const other = second![i]!;
      if (figure.value === null || figure.standardError === null) expect(other.value).toBe(figure.value);
      else expect(Math.abs(figure.value - other.value!) / figure.standardError, `${figure.key} ${figure.depth ?? figure.gate ?? ''}`).toBeLessThan(0.01);
    }
  });

  test('goes further towards the fixed point in sixteen passes than in eight on strong noise, with the same first-order estimate', () => {
    const strong = made('strong noise', 0.02).patches[0]!.circuits;
    const problem = poseProblem(idealGateSet(quarter.gates, [0]), strong);
    const at = (count: number) => runPasses(problem, problem.observed, count);
    const distance = (a: Float64Array, b: Float64Array): number => Math.sqrt(a.reduce((sum, v, i) => sum + (v - b[i]!) ** 2, 0));
    const [eight, sixteen, limit] = [at(8), at(16), at(64)];
    expect([eight.stopped, sixteen.stopped, limit.stopped]).toEqual([false, false, false]);
    expect(sixteen.first).toEqual(eight.first);
    expect(distance(sixteen.e, limit.e)).toBeLessThan(0.2 * distance(eight.e, limit.e));
  });

  test('reaches every patch of a chained register', () => {
    const input = makeRegister('two in a row', lineGates(2), linePatches(2, 220, 420));
    const of = (method: string) => estimate({ dataset: input, contentId: 'cd'.repeat(32), gateClass: null, replicates: 4, method });
    const [first, second] = [of('M1'), of('M2')];
    expect([first.result.method, second.result.method]).toEqual(['M1', 'M2']);
    expect(first.result.patches.map((p) => p.rank)).toEqual(second.result.patches.map((p) => p.rank));
    const same = first.replicates.values.filter((v, i) => Number.isFinite(v) && v === second.replicates.values[i]);
    expect(same).toHaveLength(0);
    expect(first.result.patches.every((p, i) => p.misfit!.expected !== second.result.patches[i]!.misfit!.expected)).toBe(true);
  });
});
