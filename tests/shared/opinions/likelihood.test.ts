import { describe, expect, test } from 'vitest';
import { estimate } from '#shared/method/estimate.ts';
import { probabilitiesOf } from '#shared/method/readings.ts';
import { smallestChoiEigenvalue } from '#shared/quantum/choi.ts';
import { STATIONARY } from '#shared/opinions/ascend.ts';
import { likelihood, positiveLikelihood } from '#shared/opinions/likelihood.ts';
import { logLikelihood } from '#shared/opinions/log-likelihood.ts';
import { mapsOf, patchCases } from '#shared/opinions/patch-case.ts';
import { SecondOpinions } from '#shared/opinions/opine.ts';
import reference from '#tests/reference/opinions/likelihood.json' with { type: 'json' };
import { dataset, one, QUARTER } from '../method/made.ts';
import { lossesOf, makeCase } from './made-case.ts';

const firstRows = (gates: Float64Array, D: number): number[] => [...gates].filter((_, i) => i % (D * D) < D);

describe('trace-preserving maximum likelihood', () => {
  const made = makeCase({ noise: 3e-3, spam: 0.02, shots: 1000, count: 300, seed: 'likelihood' });
  const found = likelihood(made.patch);

  test('the likelihood never decreases, starts at the official estimate, and ends where the step left is below a thousandth of a standard error', () => {
    const { counts, circuits, set } = made.patch.problem;
    expect(found.path[0]).toBeCloseTo(logLikelihood(counts, probabilitiesOf(set, circuits, mapsOf(made.patch.problem, made.patch.passes.e))), 9);
    found.path.slice(1).forEach((value, i) => expect(value).toBeGreaterThan(found.path[i]!));
    expect(found.convergence.converged).toBe(true);
    expect(found.convergence.remaining).toBeLessThan(STATIONARY);
    expect(found.convergence.gain).toBeGreaterThan(0);
  });

  test('stationary by an oracle: no parameter moved up or down by a hundredth of a typical standard error raises the likelihood', () => {
    const { counts, circuits, set } = made.patch.problem;
    const at = logLikelihood(counts, probabilitiesOf(set, circuits, found.maps));
    for (const part of ['gates', 'state', 'effects'] as const) {
      for (let i = 0; i < found.maps[part].length; i++) {
        if (part === 'gates' && i % 16 < 4) continue;
        if (part === 'state' && i === 0) continue;
        for (const step of [1e-5, -1e-5]) {
          const moved = { ...found.maps, [part]: found.maps[part].slice() };
          moved[part][i]! += step;
          // Half the curvature times the step squared is far above what the slope left over could give.
          expect(logLikelihood(counts, probabilitiesOf(set, circuits, moved))).toBeLessThan(at + 1e-4);
        }
      }
    }
  });

  test('the trace is preserved exactly: first rows are (1, 0, 0, 0) to the bit', () => {
    expect(firstRows(found.maps.gates, 4)).toEqual([1, 0, 0, 0, 1, 0, 0, 0, 1, 0, 0, 0]);
  });

  test('with gates completely positive: Choi eigenvalues at least −1e-12, trace exact, likelihood rising, never above the free maximum', () => {
    const bound = positiveLikelihood(made.patch, found);
    for (let k = 0; k < 3; k++) expect(smallestChoiEigenvalue(bound.maps.gates.subarray(16 * k, 16 * k + 16), 1)).toBeGreaterThanOrEqual(-1e-12);
    expect(firstRows(bound.maps.gates, 4)).toEqual([1, 0, 0, 0, 1, 0, 0, 0, 1, 0, 0, 0]);
    bound.path.slice(1).forEach((value, i) => expect(value).toBeGreaterThan(bound.path[i]!));
    expect(bound.path.at(-1)).toBeLessThanOrEqual(found.path.at(-1)!);
  });

  test('agrees with the truth within the official 95 % intervals widened to 99.9 %: gate loss and retained signal', () => {
    const { result } = estimate({ dataset: made.data, contentId: '5'.repeat(64), gateClass: made.gateClass, replicates: 200 });
    const { figures, convergence } = new SecondOpinions({ dataset: made.data, gateClass: made.gateClass, seal: null, official: result.figures }).opine('likelihood');
    expect(convergence?.converged).toBe(true);
    const real = lossesOf(made.set, made.truth);
    figures.filter((f) => f.key === 'gate-loss').forEach((f, k) => {
      const error = result.figures.find((o) => o.key === 'gate-loss' && o.gate === f.gate)!.standardError!;
      expect(Math.abs(f.value! - real[k]!)).toBeLessThan(3.3 * error);
      expect(Math.abs(f.distance!)).toBeLessThan(3);
    });
  });
});

test(`the maximum agrees with ${reference.tool} (${reference.how}): log-likelihood to 1e-5, losses and probabilities to 1e-5`, () => {
  const gates = one('id', ['rx', QUARTER], ['ry', QUARTER]);
  const { shots } = reference;
  const circuits = reference.circuits.map((c, i) => ({ id: `c${i}`, gates: c.map((k) => gates[k]!.label), shots, counts: { 0: reference.zeros[i]!, 1: shots - reference.zeros[i]! } }));
  const [patch] = patchCases({ dataset: dataset(gates, circuits), gateClass: null, seal: null, official: [] });
  const found = likelihood(patch!);
  expect(found.convergence.converged).toBe(true);
  expect(Math.abs(found.path.at(-1)! - reference.logLikelihood)).toBeLessThan(1e-5);
  lossesOf(patch!.problem.set, found.maps).forEach((v, k) => expect(Math.abs(v - reference.losses[k]!)).toBeLessThan(1e-5));
  const p = probabilitiesOf(patch!.problem.set, patch!.problem.circuits, found.maps);
  reference.probabilities.forEach((v, i) => expect(Math.abs(p[2 * i]! - v)).toBeLessThan(1e-5));
});
