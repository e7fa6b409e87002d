import { beforeAll, describe, expect, it } from 'vitest';
import type { Figure, Result } from '#shared/formats/types.ts';
import { estimate } from '#shared/method/estimate.ts';
import { independentFixture, inputOf, qutipFixture, type IndependentFixture } from '#tests/shared/method/independent-fixture.ts';

/**
 * The method against a second implementation that was written from its text alone (numpy, its own SVD, eigenvalues and
 * random numbers). Point values agree to 1e-9. Intervals agree within Monte-Carlo error: with B and B′ replicates a
 * standard error scatters by √(1/2B + 1/2B′) of itself and a 95 % end by 2.67·√(1/B + 1/B′) standard errors (normal law);
 * limits are 4.5 of these, since the tails of some figures are longer than normal.
 */
interface Case { name: string; replicates: number; load: () => IndependentFixture }

const own = (name: string, replicates = 2000): Case => ({ name, replicates, load: () => independentFixture(name) });
const cases: Case[] = [
  own('quarter-sealed'), own('clifford-unequal-shots'), own('odd-gates'), own('half-turns'), own('unsettled'), own('stopped'), own('too-weak'),
  own('pair-reversed', 100), own('chained-two', 100), own('chained-three', 100), { name: 'dataset simulated by QuTiP', replicates: 2000, load: qutipFixture },
];

const identity = ({ key, depth, gate, qubits }: Figure): string => [key, depth, gate, qubits.join(',')].join(' ');
const near = (got: number | null | undefined, want: number | null | undefined, what: string, tolerance = 1e-9): void => {
  if (typeof want !== 'number' || typeof got !== 'number') expect(got, what).toBe(want);
  else expect(Math.abs(got - want), `${what}: ${got}, not ${want}`).toBeLessThanOrEqual(tolerance * Math.max(1, Math.abs(want)));
};

describe.each(cases)('the estimate of $name, against an independent implementation (numpy 2.4, recomputed)', ({ replicates, load }) => {
  let fixture: IndependentFixture;
  let result: Result;
  beforeAll(() => {
    fixture = load();
    ({ result } = estimate(inputOf(fixture, replicates)));
  }, 240_000);

  it('keeps out the sealed circuits and judges every patch alike', () => {
    expect(result.sealed).toBe(fixture.expected.sealed);
    expect(result.patches).toHaveLength(fixture.expected.patches.length);
    fixture.expected.patches.forEach((want, i) => {
      const { qubits, columns, gaugeDimension, rank, rankAmbiguous, complete, sound, settled } = want;
      const got = result.patches[i]!;
      expect(got).toMatchObject({ qubits, columns, gaugeDimension, rank, rankAmbiguous, complete, sound, settled });
      near(got.conditionRatio, want.conditionRatio, 'ratio');
      // A chained pair's fixture leaves its spectrum out: the text does not say whether at ideal or at estimated local gates.
      if (want.spectrum.length > 0) near(got.spectrum[0], want.spectrum[0], 'largest singular value');
    });
  });

  it('finds the same error maps in the minimum-norm gauge, and the same smallest Choi eigenvalue of the state of trace 1', () => {
    fixture.expected.patches.forEach((want, i) => want.gateMaps.forEach((map) => {
      const got = result.patches[i]!.gateMaps.find(({ gate }) => gate === map.gate)!;
      near(got.smallestChoiEigenvalue, map.smallestChoiEigenvalue, map.gate);
      (map.errorMap ?? []).forEach((x, k) => near(got.errorMap[k], x, `${map.gate} ${k}`));
    }));
  });

  it('gives every figure of the single pass and of all passes, and leaves the same ones undetermined', () => {
    const got = new Map(result.figures.map((f) => [identity(f), f]));
    for (const want of fixture.expected.figures) {
      const what = identity(want);
      const { determined, extrapolated, firstOrderOnly } = want;
      expect(got.get(what), what).toMatchObject({ determined, extrapolated, firstOrderOnly });
      near(got.get(what)!.value, want.value, what);
      near(got.get(what)!.firstOrder, want.firstOrder, `${what}, single pass`);
      got.delete(what);
    }
    for (const rest of got.values()) expect(rest, identity(rest)).toMatchObject({ value: null, reason: 'no bench circuits' });
  });

  it('gives standard errors and graded intervals within Monte-Carlo error', () => {
    const scatter = 4.5 * Math.sqrt(1 / replicates + 1 / fixture.expected.replicates);
    for (const want of fixture.expected.figures.filter((f) => f.intervals)) {
      const got = result.figures.find((f) => identity(f) === identity(want))!;
      const error = want.standardError!;
      near(got.standardError! / error, 1, `${identity(want)}, standard error`, scatter / Math.SQRT2);
      want.intervals!.forEach(({ level, low, high }, k) => {
        near((got.intervals![k]!.low - low) / error, 0, `${identity(want)}, low ${level}`, 2.67 * scatter);
        near((got.intervals![k]!.high - high) / error, 0, `${identity(want)}, high ${level}`, 2.67 * scatter);
      });
    }
  });

  it('predicts the circuits that were asked for, and refuses the same ones', () => {
    const scatter = 2.67 * 4.5 * Math.sqrt(1 / replicates + 1 / fixture.expected.replicates);
    fixture.expected.predictions.forEach((want, i) => {
      const got = result.predictions[i]!;
      expect(got).toMatchObject({ id: want.id, determined: want.determined, firstOrderOnly: want.firstOrderOnly });
      for (const [outcome, p] of Object.entries(want.probabilities ?? {})) {
        near(got.probabilities![outcome], p, `${want.id} ${outcome}`);
        const [low, high] = want.intervals![outcome]!;
        const error = (high - low) / 3.92;
        near((got.intervals![outcome]![0] - low) / error, 0, `${want.id} ${outcome} low`, scatter);
        near((got.intervals![outcome]![1] - high) / error, 0, `${want.id} ${outcome} high`, scatter);
      }
    });
  });

  it('measures the misfit and the sealed circuits alike', () => {
    fixture.expected.patches.forEach((want, i) => {
      near(result.patches[i]!.misfit!.residualSum, want.misfit!.residualSum, 'residual sum');
      near(result.patches[i]!.misfit!.expected / want.misfit!.expected, 1, 'expected', 0.02);
      near(result.patches[i]!.misfit!.sigmas, want.misfit!.sigmas, 'sigmas', 0.3);
    });
    const want = fixture.expected.sealedCheck;
    if (!want) return expect(result.sealedCheck).toBeNull();
    expect(result.sealedCheck!.passed).toBe(want.passed);
    near(result.sealedCheck!.value, want.value, 'prediction error');
    near(result.sealedCheck!.ideal, want.ideal, 'the ideal model');
    near(result.sealedCheck!.noise / want.noise, 1, 'noise alone', 0.05);
    near(result.sealedCheck!.z, want.z, 'z', 0.5);
  });
});

describe('the estimate of a dataset simulated by QuTiP 4.7.1, against the simulated device', () => {
  it('meets the true retained signal at every depth and the true loss of every gate within four standard errors', () => {
    const fixture = qutipFixture();
    const { result } = estimate(inputOf(fixture, 1000));
    const truth = (f: Figure): number | undefined => {
      if (f.key === 'retained-signal') return fixture.truth.retainedSignal[String(f.depth)];
      // Loss = 1 − F_e and F_avg = (2F_e + 1)/3, so the loss is 1.5 times the average infidelity.
      return f.key === 'gate-loss' ? 1.5 * (1 - fixture.truth.averageGateFidelity[f.gate!]!) : undefined;
    };
    const compared = result.figures.flatMap((f) => (truth(f) === undefined ? [] : [{ what: identity(f), z: (f.value! - truth(f)!) / f.standardError! }]));
    expect(compared).toHaveLength(10);
    for (const { what, z } of compared) expect(Math.abs(z), what).toBeLessThan(4);
  });
});
