import { describe, expect, test } from 'vitest';
import { estimate } from '#shared/method/estimate.ts';
import { idealSpam, idealSpamGauge } from '#shared/opinions/ideal-spam.ts';
import { SecondOpinions } from '#shared/opinions/opine.ts';
import { singlePass } from '#shared/opinions/single-pass.ts';
import { layoutOf } from '#shared/method/parameters.ts';
import { designMatrix } from '#shared/method/design.ts';
import { multiplyVector } from '#shared/linalg/sparse.ts';
import { farthest, lossesOf, makeCase, shipped } from './made-case.ts';
import { idealGateSet, indexCircuits } from '#shared/method/gate-set.ts';
import { drawCircuits, seeded } from '../method/made.ts';

describe('the single pass', () => {
  test('gives, figure by figure and to the bit, what the official estimate keeps as firstOrder', () => {
    const { data, gateClass, seal } = makeCase({ noise: 5e-3, spam: 0.02, shots: 1000, count: 300, sealed: 60, seed: 'single pass' });
    const { result } = estimate({ dataset: data, contentId: '7'.repeat(64), gateClass, seal, replicates: 50 });
    const opinion = new SecondOpinions({ dataset: data, gateClass, seal, official: result.figures }).opine('single-pass');
    expect(opinion.figures.length).toBe(6);
    for (const figure of opinion.figures) {
      const official = result.figures.find((f) => f.key === figure.key && f.depth === figure.depth && f.gate === figure.gate)!;
      // The official error per gate is found from the estimate's own vectors, this one from the identity: the same eigenvalue to rounding.
      if (figure.key === 'error-per-gate') expect(Math.abs(figure.value! - official.firstOrder!)).toBeLessThan(1e-13);
      else expect(figure.value).toBe(official.firstOrder);
      expect(figure.official).toBe(official.value);
      expect(figure.distance).toBe((figure.value! - official.value!) / official.standardError!);
    }
    const error = result.figures.find((f) => f.key === 'prediction-error')!;
    expect(opinion.prediction!.value).toBeCloseTo(error.firstOrder!, 15);
    expect(opinion.prediction!.official).toBeCloseTo(error.value!, 15);
    expect(opinion.prediction!.ideal).toBeCloseTo(result.sealedCheck!.ideal, 15);
  });

  test('has a bias that grows as the square of the noise, from 1e-3 to 1e-2 ("Randomized linear gate set tomography", PRX Quantum 2, 030328, 2021: first order)', () => {
    const noises = [1e-3, 2e-3, 5e-3, 1e-2];
    // Every error, coherent, stochastic and SPAM, in proportion to the noise; probabilities exact, so that all there is is bias.
    const biases = noises.map((noise) => {
      const { patch, set, truth } = makeCase({ noise, coherent: noise, spam: noise, count: 300, seed: 'growing' });
      const bare = lossesOf(set, singlePass(patch));
      const real = lossesOf(set, truth);
      return bare.reduce((s, v, k) => s + Math.abs(v - real[k]!), 0) / bare.length;
    });
    noises.slice(1).forEach((noise, i) => {
      const slope = Math.log(biases[i + 1]! / biases[i]!) / Math.log(noise / noises[i]!);
      expect(slope).toBeGreaterThan(1.85);
      expect(slope).toBeLessThan(2.15);
    });
  });
});

describe('process tomography with SPAM taken as ideal', () => {
  test('finds the truth where preparation and readout are ideal: losses and probabilities to the 1e-6 that eight passes leave', () => {
    const { patch, set, truth, data } = makeCase({ noise: 1e-3, spam: 0, seed: 'ideal spam' });
    const { maps, problem } = idealSpam(patch);
    expect(problem.inverse.rank).toBe(30);
    expect(problem.complete).toBe(true);
    lossesOf(set, maps).forEach((v, k) => expect(Math.abs(v - lossesOf(set, truth)[k]!)).toBeLessThan(1e-6));
    expect(farthest(set, maps, truth, data.patches[0]!.circuits)).toBeLessThan(1e-6);
  });

  test('lays a readout error to the gates: 2 % makes every loss too large, many times what the official estimate is off', () => {
    const { patch, set, truth } = makeCase({ noise: 1e-3, spam: 0.02, seed: 'ideal spam' });
    const real = lossesOf(set, truth);
    const found = lossesOf(set, idealSpam(patch).maps);
    const mean = (v: readonly number[]): number => v.reduce((s, x) => s + x, 0) / v.length;
    expect(mean(found) - mean(real)).toBeGreaterThan(1e-3);
  });

  test('gauge: every direction that leaves preparation and effects alone is invisible to the design, 6 for one qubit, 180 for a pair', () => {
    for (const [id, qubits, dimension, columns] of [['quarter-turn-1q/1', [0], 6, 36], ['quarter-turn-cz-2q/1', [0, 1], 180, 1200]] as const) {
      const { gates, lengths } = shipped(id);
      const set = idealGateSet(gates, qubits);
      const layout = layoutOf(set, new Set(set.gates.keys()));
      const gauge = idealSpamGauge(set, layout);
      expect(layout.columns).toBe(columns);
      expect(gauge.dimension).toBe(dimension);
      const design = designMatrix(set, layout, indexCircuits(set, drawCircuits(gates, lengths, 60, seeded('gauge'))));
      const image = new Float64Array(design.rows);
      for (let q = 0; q < dimension; q++) {
        multiplyVector(design, gauge.basis.subarray(q * columns, (q + 1) * columns), image);
        for (const v of image) expect(Math.abs(v)).toBeLessThan(1e-12);
      }
    }
  });
});
