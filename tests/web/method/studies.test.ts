import { describe, expect, it } from 'vitest';
import coverage from '#shared/studies/coverage.json' with { type: 'json' };
import { figureDomains } from '#shared/domain/figure-domains.ts';
import { coverageInterval } from '#shared/studies/coverage-rule.ts';
import { coverageStudySchema, type CoverageCell } from '#shared/studies/coverage-study.ts';
import { coverageRows, coverageTable, figureOptions, judgedCells, levels } from '#web/features/method/studies/coverage-data.ts';
import { domainRows } from '#web/features/method/studies/domain-data.ts';
import { holds, rankRows, rankTable } from '#web/features/method/studies/rank-data.ts';

const study = coverageStudySchema.parse(coverage);
const all = { coherent: null, shots: null };
const made = (noise: number, inside95: number, settled: [number, number] = [400, inside95]): CoverageCell => ({
  gateClass: 'quarter-turn-1q/1', noise, coherent: 0.5, shots: 500, trials: 400, devices: 8, replicates: 200, settled: settled[0], stopped: 0, sealedPassed: 396, greatestLoss: noise,
  figures: [{ key: 'retained-signal', depth: 16, gate: null, qubits: [0], trials: 400, inside: [200, 320, inside95], below: 10, above: 10, z: [0, 1], settled }],
});
const one = (cell: CoverageCell) => judgedCells({ cells: [cell] }, { gateClass: cell.gateClass, figure: 'retained-signal/16//0', ...all });

describe('the coverage study on the method page', () => {
  it('offers every figure of every class once, and each leads to as many rows as cells have it', () => {
    for (const gateClass of new Set(study.cells.map((c) => c.gateClass))) {
      const options = figureOptions(study, gateClass);
      expect(new Set(options.map((o) => o.label)).size, gateClass).toBe(options.length);
      for (const { value, label } of options) {
        const judged = judgedCells(study, { gateClass, figure: value, ...all });
        expect(judged.length, `${gateClass} ${label}`).toBeGreaterThan(0);
        expect(new Set(coverageRows(judged).map((r) => r.key)).size).toBe(judged.length);
      }
    }
  });

  it('draws the shares of the committed counts with their 99 % Wilson intervals, and prints the same', () => {
    const judged = judgedCells(study, { gateClass: 'quarter-turn-1q/1', figure: 'retained-signal/16//0', ...all });
    const rows = coverageRows(judged);
    const table = coverageTable(judged, 'Coverage');
    judged.forEach(({ figure }, i) => {
      expect(rows[i]?.marks.map((m) => m.value)).toEqual(figure.inside.map((n) => n / figure.trials));
      expect(rows[i]?.marks.map(({ low, high }) => ({ low, high }))).toEqual(figure.inside.map((n) => coverageInterval(n, figure.trials)));
      expect(levels.map((level) => table.rows[i]?.[table.columns.findIndex((c) => c.csv === `coverage_${level * 100}`)]?.raw)).toEqual(figure.inside.map((n) => n / figure.trials));
      expect(table.rows[i]).toHaveLength(table.columns.length);
    });
  });

  it('marks a cell as outside where the interval of its settled trials misses 93 to 97 %, and claims nothing of few trials', () => {
    expect(one(made(0.001, 380))[0]?.verdict).toBe('inside');
    expect(one(made(0.001, 340))[0]?.verdict).toBe('outside');
    expect(one(made(0.001, 340, [200, 190]))[0]?.verdict).toBe('inside');
    expect(one(made(0.001, 380, [30, 29]))[0]?.verdict).toBe('too few trials');
    const [row] = coverageRows(one(made(0.001, 340)));
    expect([row?.marks.map((m) => m.passed), row?.remark]).toEqual([[true, true, false], 'outside']);
  });

  it('filters by coherent share and shots', () => {
    const judged = judgedCells(study, { gateClass: 'quarter-turn-1q/1', figure: 'retained-signal/16//0', coherent: 1, shots: 2000 });
    expect(judged.length).toBeGreaterThan(0);
    expect(judged.every(({ cell }) => cell.coherent === 1 && cell.shots === 2000)).toBe(true);
  });
});

describe('the domain on the method page', () => {
  it('names every figure of the study, with the ranges by which boards judge', () => {
    const rows = domainRows(figureDomains, study, 'quarter-turn-1q/1', 'quarter-turn-1q/1');
    const figures = new Set(study.cells.filter((c) => c.gateClass === 'quarter-turn-1q/1').flatMap((c) => c.figures).filter((f) => f.key !== 'prediction').map((f) => `${f.key} ${f.depth}`));
    expect(new Set(rows.map((r) => r.key.split(' ').slice(0, 2).join(' ')))).toEqual(figures);
  });

  it('joins neighbouring ranges of shots that allow the same, and says where nothing was shown', () => {
    const cells = [made(0.001, 380)];
    const domain = (from: number, below: number | null, to: number) => ({ gateClass: 'quarter-turn-1q/1', key: 'retained-signal' as const, depth: 16, gateLoss: { from: 0, to }, shots: { from, below } });
    const words = (...domains: ReturnType<typeof domain>[]) => domainRows(domains, { cells }, 'quarter-turn-1q/1', 'quarter-turn-1q/1').map((r) => [r.shots, r.loss]);
    expect(words(domain(500, 2000, 0.006), domain(2000, null, 0.006))).toEqual([['500 and more', 'up to 0.6\u202f%']]);
    expect(words(domain(500, 2000, 0.006), domain(2000, null, 0.003))).toEqual([['500 to below 2\u202f000', 'up to 0.6\u202f%'], ['2\u202f000 and more', 'up to 0.3\u202f%']]);
    expect(words()).toEqual([['any', null]]);
  });
});

describe('the rank study on the method page', () => {
  const scenario = (covered: number) => ({ id: 'equal', title: 'Ten equal devices', offsets: Array.from({ length: 10 }, () => 0), shots: Array.from({ length: 10 }, () => 1000), boards: 2000, covered, naiveCovered: 440, meanWidth: 9.7 });

  it('a scenario holds unless its share lies below the level by more than three standard errors: 1,871 of 2,000 at 95 %', () => {
    // 0.95 − 3 √(0.95 · 0.05 / 2000) = 0.93538: recomputed by hand.
    expect([holds(scenario(1871), 0.95), holds(scenario(1870), 0.95), holds(scenario(2000), 0.95)]).toEqual([true, false, true]);
    expect(rankRows({ scenarios: [scenario(1800)], level: 0.95 })[0]).toMatchObject({ remark: 'too low', marks: [{ value: 0.9, passed: false }] });
    const table = rankTable({ scenarios: [scenario(1900)], level: 0.95 }, 'Ranks');
    expect(table.rows[0]?.map((c) => c.raw)).toEqual(['Ten equal devices', 10, 2000, 1900, 0.95, 9.7, 440, 'holds']);
  });
});
