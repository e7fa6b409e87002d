import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { domainsOf, studiedClassOf } from '#shared/domain/figure-domain.ts';
import { coverageAccepted } from '#shared/studies/coverage-rule.ts';
import type { CoverageCell } from '#shared/studies/coverage-study.ts';

/** A cell whose retained signal at depth 16 held in `inside` of 2,000 settled trials. */
const cell = (greatestLoss: number, inside: number, more: Partial<CoverageCell> = {}): CoverageCell => ({
  gateClass: 'quarter-turn-1q/1', noise: greatestLoss, coherent: 0, shots: 500, trials: 2000, devices: 40, replicates: 200, settled: 2000, stopped: 0, sealedPassed: 1980, greatestLoss,
  figures: [{ key: 'retained-signal', depth: 16, gate: null, qubits: [0], trials: 2000, inside: [1000, 1600, inside], below: 0, above: 2000 - inside, z: [0, 1], settled: [2000, inside] }],
  ...more,
});
const domains = (...cells: CoverageCell[]) => domainsOf({ cells }, 'quarter-turn-1q/1').map((d) => [d.gateLoss.from, d.gateLoss.to, d.shots.from, d.shots.below]);
const GOOD = 1900;
const BAD = 1700;

describe('coverage is accepted where its 99 % Wilson interval meets 93 to 97 %', () => {
  it.each([[1900, 2000, true], [1835, 2000, true], [1820, 2000, false], [1962, 2000, false], [1955, 2000, true], [90, 100, true], [80, 100, false], [94, 99, false], [88, 100, true], [86, 100, false]])('%i of %i: %s', (inside, trials, accepted) => {
    expect(coverageAccepted(inside, trials)).toBe(accepted);
  });
});

describe('the domain of a figure', () => {
  it('reaches from nothing to the loudest cell before the first that fails, whatever its coherent share', () => {
    expect(domains(cell(1e-4, GOOD), cell(1e-3, GOOD), cell(3e-3, GOOD), cell(2.6e-3, GOOD, { coherent: 1 }))).toEqual([[0, 3e-3, 500, null]]);
    expect(domains(cell(1e-4, GOOD), cell(1e-3, GOOD), cell(3e-3, GOOD), cell(2.6e-3, BAD, { coherent: 1 }))).toEqual([[0, 1e-3, 500, null]]);
  });

  it('begins at the quietest cell of its run where quieter ones fail, and too wide fails as too narrow does', () => {
    expect(domains(cell(1e-4, 2000), cell(1e-3, GOOD), cell(3e-3, GOOD))).toEqual([[1e-3, 3e-3, 500, null]]);
  });

  it('is nowhere where one cell alone holds between two that fail', () => {
    expect(domains(cell(1e-4, BAD), cell(1e-3, GOOD), cell(3e-3, BAD))).toEqual([]);
  });

  it('is the common part between two studied numbers of shots, and that of the greatest beyond it', () => {
    const rich = (loss: number, inside: number) => cell(loss, inside, { shots: 2000 });
    expect(domains(cell(1e-3, GOOD), cell(6e-3, GOOD), rich(1e-3, GOOD), rich(6e-3, BAD))).toEqual([[0, 1e-3, 500, 2000], [0, 1e-3, 2000, null]]);
    expect(domains(cell(1e-3, BAD), rich(1e-3, GOOD))).toEqual([[0, 1e-3, 2000, null]]);
  });

  it('is none where every cell fails, where nothing settled, and for another class', () => {
    expect(domains(cell(1e-3, BAD))).toEqual([]);
    const still = cell(1e-3, GOOD);
    expect(domains({ ...still, figures: still.figures.map((f) => ({ ...f, settled: [0, 0] as [number, number] })) })).toEqual([]);
    expect(domainsOf({ cells: [cell(1e-3, GOOD)] }, 'clifford-t-1q/1')).toEqual([]);
  });

  it('asks it of every gate', () => {
    const row = cell(1e-3, GOOD).figures[0]!;
    const figures = (inside: number) => [{ ...row, key: 'gate-loss' as const, depth: null, gate: 'rx' }, { ...row, key: 'gate-loss' as const, depth: null, gate: 'ry', settled: [2000, inside] as [number, number] }];
    expect(domains(cell(1e-3, GOOD, { figures: figures(GOOD) }))).toHaveLength(1);
    expect(domains(cell(1e-3, GOOD, { figures: figures(BAD) }))).toEqual([]);
  });

  it('never holds a cell that fails, and is bounded by cells', () => {
    fc.assert(fc.property(fc.array(fc.tuple(fc.integer({ min: 1, max: 100 }), fc.boolean()), { minLength: 1, maxLength: 8 }), (drawn) => {
      for (const { gateLoss: { from, to } } of domainsOf({ cells: drawn.map(([loss, good]) => cell(loss * 1e-4, good ? GOOD : BAD)) }, 'quarter-turn-1q/1')) {
        expect(drawn.map(([loss]) => loss * 1e-4)).toContain(to);
        for (const [loss, good] of drawn) if (loss * 1e-4 > from && loss * 1e-4 < to) expect(good).toBe(true);
      }
    }), { seed: 3, numRuns: 200 });
  });

  it('of registers of four and five is that of three', () => {
    expect([studiedClassOf('chained-cz-5q/1'), studiedClassOf('chained-cz-4q/1'), studiedClassOf('chained-cz-2q/1')]).toEqual(['chained-cz-3q/1', 'chained-cz-3q/1', 'chained-cz-2q/1']);
  });
});
