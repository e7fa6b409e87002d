import { describe, expect, test } from 'vitest';
import { BinomialTable } from '#shared/random/binomial-table.ts';
import { binomial } from '#shared/random/binomial.ts';
import { MultinomialTable } from '#shared/random/multinomial.ts';
import { seeded } from '#tests/shared/method/made.ts';

/** Exact probabilities by logarithms of factorials. */
function masses(n: number, p: number): number[] {
  const logFactorial = [0];
  for (let k = 1; k <= n; k++) logFactorial.push(logFactorial[k - 1]! + Math.log(k));
  return Array.from({ length: n + 1 }, (_, k) => Math.exp(logFactorial[n]! - logFactorial[k]! - logFactorial[n - k]! + k * Math.log(p) + (n - k) * Math.log1p(-p)));
}

/** Pearson's statistic over cells of expectation ≥ 10 as a standard normal (Wilson–Hilferty). */
function chiSquareZ(draws: Map<number, number>, mass: number[], total: number): number {
  let statistic = 0;
  let cells = -1;
  let expected = 0;
  let seen = 0;
  mass.forEach((m, k) => {
    expected += m * total;
    seen += draws.get(k) ?? 0;
    const rest = mass.slice(k + 1).reduce((s, v) => s + v, 0) * total;
    if ((expected >= 10 && rest >= 10) || k === mass.length - 1) {
      statistic += (seen - expected) ** 2 / expected;
      cells++;
      expected = seen = 0;
    }
  });
  const h = 2 / (9 * cells);
  return (Math.cbrt(statistic / cells) - (1 - h)) / Math.sqrt(h);
}

const TOTAL = 200_000;
const cases: [number, number][] = [[1, 0.3], [12, 0.5], [30, 0.3], [25, 0.4], [1000, 0.0005], [1000, 0.02], [1000, 0.5], [1000, 0.93], [400, 0.97], [40, 0.25], [3000, 0.004]];

describe.each(cases)('n = %i, p = %d: 200,000 draws fit the exact distribution (|z| < 4)', (n, p) => {
  const mass = masses(n, p);
  const collect = (draw: () => number) => {
    const out = new Map<number, number>();
    for (let i = 0; i < TOTAL; i++) {
      const k = draw();
      out.set(k, (out.get(k) ?? 0) + 1);
    }
    return out;
  };

  test('by inversion or rejection', () => {
    const g = seeded(`binomial ${n} ${p}`);
    expect(Math.abs(chiSquareZ(collect(() => binomial(g, n, p)), mass, TOTAL))).toBeLessThan(4);
  });

  test('by table', () => {
    const g = seeded(`table ${n} ${p}`);
    const table = BinomialTable.of(n, p)!;
    expect(Math.abs(chiSquareZ(collect(() => table.draw(g.next())), mass, TOTAL))).toBeLessThan(4);
  });
});

test('a million shots: mean and variance within four standard errors', () => {
  const g = seeded('million');
  const [n, p, draws] = [1_000_000, 0.3, 50_000];
  const values = Array.from({ length: draws }, () => binomial(g, n, p));
  const mean = values.reduce((s, v) => s + v, 0) / draws;
  const variance = values.reduce((s, v) => s + (v - mean) ** 2, 0) / draws;
  expect(Math.abs(mean - n * p)).toBeLessThan(4 * Math.sqrt((n * p * (1 - p)) / draws));
  expect(Math.abs(variance / (n * p * (1 - p)) - 1)).toBeLessThan(4 * Math.sqrt(2 / draws));
  expect(BinomialTable.of(10_000_000, 0.3)).toBeNull();
});

test('nothing to draw: no trials, p = 0, p = 1', () => {
  const g = seeded('edge');
  expect([binomial(g, 0, 0.5), binomial(g, 7, 0), binomial(g, 7, 1), binomial(g, 0, 1)]).toEqual([0, 0, 7, 0]);
});

test('the table returns the smallest k with u < F(k), at both ends too', () => {
  const table = BinomialTable.of(4, 0.5)!;
  expect([0, 1 / 16 - 1e-12, 1 / 16 + 1e-12, 5 / 16 + 1e-12, 15 / 16 + 1e-12, 1 - 2 ** -53].map((u) => table.draw(u))).toEqual([0, 0, 1, 2, 4, 4]);
});

test('multinomial n = 1000, p = (.5, .3, .2): variances 250, 210, 160, covariance −150', () => {
  const draws = 40_000;
  const table = new MultinomialTable(Float64Array.from([0.5, 0.3, 0.2]), Float64Array.from([1000]), 3);
  const g = seeded('multinomial');
  const rows = Array.from({ length: draws }, () => {
    const out = new Float64Array(2);
    table.draw(g, out, 0, 1);
    return [1000 * out[0]!, 1000 * out[1]!, 1000 * (1 - out[0]! - out[1]!)];
  });
  const mean = [0, 1, 2].map((o) => rows.reduce((s, r) => s + r[o]!, 0) / draws);
  const covariance = (a: number, b: number) => rows.reduce((s, r) => s + (r[a]! - mean[a]!) * (r[b]! - mean[b]!), 0) / draws;
  [500, 300, 200].forEach((want, o) => expect(Math.abs(mean[o]! - want)).toBeLessThan(0.35));
  [250, 210, 160].forEach((want, o) => expect(Math.abs(covariance(o, o) / want - 1)).toBeLessThan(0.03));
  expect(Math.abs(covariance(0, 1) / -150 - 1)).toBeLessThan(0.05);
});
