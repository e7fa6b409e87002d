import { describe, expect, it } from 'vitest';
import { ineligibility, patchFloor, type EligibilityFacts } from '#shared/domain/eligibility.ts';
import type { FigureDomain } from '#shared/domain/figure-domain.ts';
import type { Figure } from '#shared/formats/types.ts';

const figure = (key: Figure['key'], depth: number | null, value: number | null, high = 0): Figure => ({
  key, depth, gate: null, qubits: [0], value, standardError: 0.001, intervals: value === null ? null : [{ level: 0.95, low: value, high }], firstOrder: value, determined: value !== null, reason: null, extrapolated: false, firstOrderOnly: false, replicates: 2000,
});
const retained = figure('retained-signal', 16, 0.97, 0.98);
const good: EligibilityFacts = {
  gateClass: { id: 'quarter-turn-1q/1', kind: 'joint', ranked: true, floor: { circuits: 200, shots: 500 } },
  runSheet: 'RS-000001',
  patches: [{ qubits: [0], complete: true, sound: true, rankAmbiguous: false, settled: true, circuits: 200, shots: 500 }],
  sealedCheck: { passed: true },
  figures: [retained, figure('gate-loss', null, 0.002, 0.004)],
  figure: { key: 'retained-signal', depth: 16, found: retained },
  newer: null,
  state: 'frozen',
};
const patch = (more: object): EligibilityFacts => ({ ...good, patches: [{ ...good.patches[0]!, ...more }] });
const codes = (facts: EligibilityFacts, domains: FigureDomain[] | null = null): string[] => ineligibility(facts, domains).map((r) => r.code);

describe('eligibility for a board', () => {
  it('is given where every rule of equal terms holds', () => {
    expect(ineligibility(good)).toEqual([]);
  });

  it.each<[string, EligibilityFacts]>([
    ['class-unranked', { ...good, gateClass: { ...good.gateClass!, ranked: false } }],
    ['own-design', { ...good, runSheet: null }],
    ['structured', { ...good, runSheetKind: 'structured' }],
    ['design', patch({ sound: false })],
    ['design', patch({ complete: false })],
    ['ambiguous', patch({ rankAmbiguous: true })],
    ['unsettled', patch({ settled: false })],
    ['no-sealed-check', { ...good, sealedCheck: null }],
    ['sealed-check', { ...good, sealedCheck: { passed: false } }],
    ['floor', patch({ circuits: 199 })],
    ['floor', patch({ shots: 499 })],
    ['no-figure', { ...good, figure: { ...good.figure, found: null } }],
    ['newer', { ...good, newer: 'EVB-000002.1' }],
    ['withdrawn', { ...good, state: 'withdrawn' }],
  ])('falls with %s alone, and says why and what would change it', (code, facts) => {
    expect(codes(facts)).toEqual([code]);
    const [reason] = ineligibility(facts);
    expect(reason?.sentence).toMatch(/^[A-Z0-9].*\.$/);
    expect(reason?.remedy).toMatch(/^[A-Z].*\.$/);
  });

  it('tells all reasons at once, the gravest first', () => {
    expect(codes({ ...patch({ settled: false, shots: 100 }), state: 'withdrawn', newer: 'EVB-000002.1' })).toEqual(['withdrawn', 'unsettled', 'floor', 'newer']);
  });

  it('takes an unknown class as unranked', () => {
    expect(codes({ ...good, gateClass: null })).toEqual(['class-unranked']);
  });

  it('asks for the class’s floor of pair patches and for max(200, a third) of one-qubit patches in a chain', () => {
    const chained = { kind: 'chained' as const, floor: { circuits: 900 } };
    expect([patchFloor(chained, 2), patchFloor(chained, 1), patchFloor({ ...chained, floor: { circuits: 300 } }, 1)]).toEqual([900, 300, 200]);
    expect(patchFloor({ kind: 'joint', floor: { circuits: 200 } }, 1)).toBe(200);
  });

  it('with a domain table: inside by the upper bound of the largest gate loss and by shots; a figure that was never studied is outside', () => {
    const domain: FigureDomain = { gateClass: 'quarter-turn-1q/1', key: 'retained-signal', depth: 16, gateLoss: { from: 0, to: 0.01 }, shots: { from: 500, below: null } };
    expect(codes(good, [domain])).toEqual([]);
    expect(codes(good, [{ ...domain, gateLoss: { from: 0, to: 0.003 } }])).toEqual(['domain']);
    expect(codes(good, [{ ...domain, gateLoss: { from: 0.003, to: 0.01 } }])).toEqual(['domain']);
    expect(codes(good, [{ ...domain, shots: { from: 1000, below: null } }])).toEqual(['domain']);
    expect(codes(good, [{ ...domain, shots: { from: 100, below: 500 } }])).toEqual(['domain']);
    expect(codes(good, [{ ...domain, depth: 64 }])).toEqual(['domain']);
    expect(codes(good, [])).toEqual(['domain']);
  });

  it('says in numbers why a figure is outside its domain, and what would change it', () => {
    const domain: FigureDomain = { gateClass: 'quarter-turn-1q/1', key: 'retained-signal', depth: 16, gateLoss: { from: 0, to: 0.003 }, shots: { from: 500, below: null } };
    const sentence = (domains: FigureDomain[]) => ineligibility(good, domains)[0]!.sentence;
    expect(sentence([domain])).toBe('Retained signal, depth 16: its intervals were shown to hold up to a gate loss of 0.0030; this entry’s may be as high as 0.0040.');
    expect(sentence([{ ...domain, gateLoss: { from: 0.003, to: 0.01 } }])).toBe('Retained signal, depth 16: its intervals were shown to hold from a gate loss of 0.0030 on; this entry’s may be as low as 0.0020.');
    expect(sentence([{ ...domain, shots: { from: 1000, below: null } }])).toBe('Retained signal, depth 16: its intervals were not shown to hold in this gate class at 500 shots.');
    expect(ineligibility(good, [{ ...domain, shots: { from: 1000, below: null } }])[0]!.remedy).toBe('A dataset of at least 1000 shots a circuit, or another figure.');
    expect(sentence([])).toBe('Retained signal, depth 16: its intervals were not shown to hold in this gate class at any gate loss.');
  });
});
