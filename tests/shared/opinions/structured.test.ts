import { describe, expect, test } from 'vitest';
import { gateClassById } from '#shared/domain/gate-classes.ts';
import { judgeDesign } from '#shared/method/judge-design.ts';
import { estimate } from '#shared/method/estimate.ts';
import { SecondOpinions } from '#shared/opinions/opine.ts';
import { structured } from '#shared/opinions/structured.ts';
import { drawSheet } from '#shared/runsheet/draw-sheet.ts';
import { openSeal } from '#shared/runsheet/seal.ts';
import { structureOf } from '#shared/runsheet/sheet-plan.ts';
import { powersOf, readStructure, type StructuredPlan } from '#shared/runsheet/structured-plan.ts';
import { farthest, lossesOf, makeCase, shipped } from './made-case.ts';

function sheetOf(id: string, circuits = 300) {
  const gateClass = shipped(id);
  let n = 0;
  return drawSheet({
    gateClass, register: gateClass.registerSize === 1 ? ['q0'] : ['q0', 'q1'], circuits, shots: 1000, seed: '0b', kind: 'structured',
    issued: { id: 'RS-000007', device: { provider: 'Saltmarsh Atoms', name: 'Eddy-1' }, drawnAt: '2026-05-01T08:00:00Z' }, newSecret: () => new Uint8Array(32).fill(++n),
  });
}

describe('structured run sheets', () => {
  test.each(['quarter-turn-1q/1', 'clifford-t-1q/1'])('%s: sequences span all states and effects; every circuit reads back as a part of the plan; the sheet is sound by its unsealed circuits', (id) => {
    const gateClass = shipped(id);
    const plan = structureOf(gateClass);
    expect(plan.preparations[0]).toEqual([]);
    expect(plan.readouts[0]).toEqual([]);
    expect([plan.preparations.length, plan.readouts.length]).toEqual([6, 6]);
    const { sheet, secret } = sheetOf(id);
    const { circuits, sealed } = sheet.patches[0]!;
    expect([circuits.length, sealed]).toEqual([375, 75]);
    for (const { gates } of circuits) {
      const parts = readStructure(gates, plan);
      expect(parts.length).toBeGreaterThan(0);
      for (const { preparation, block, power, readout } of parts) {
        expect([...plan.preparations[preparation]!, ...Array.from({ length: power }, () => plan.blocks[block]!).flat(), ...plan.readouts[readout]!]).toEqual(gates);
      }
    }
    const kept = new Set(openSeal(sheet, secret!).sealed);
    expect(judgeDesign({ gates: sheet.gates, qubits: [0], circuits: circuits.filter((c) => !kept.has(c.id)) }).sound(gateClass.expectedRank)).toBe(true);
  });

  test('the same seed gives the same circuits; the kind is drawn from the same stream otherwise', () => {
    expect(sheetOf('quarter-turn-1q/1').sheet.patches).toEqual(sheetOf('quarter-turn-1q/1').sheet.patches);
  });

  test('blocks are repeated 1, 2, 4 … times within the longest length of the class', () => {
    expect(powersOf(['a'], 16)).toEqual([1, 2, 4, 8, 16]);
    expect(powersOf(['a', 'b'], 16)).toEqual([1, 2, 4, 8]);
  });

  test('readings: a circuit that can be taken apart in several ways is, and one that cannot is told by none', () => {
    const plan: StructuredPlan = { preparations: [[], ['a']], blocks: [['a'], ['a', 'b']], readouts: [[], ['b']], longest: 4 };
    expect(readStructure(['a', 'a'], plan)).toEqual([{ preparation: 0, block: 0, power: 2, readout: 0 }, { preparation: 1, block: 0, power: 1, readout: 0 }]);
    expect(readStructure([], plan)).toEqual([{ preparation: 0, block: -1, power: 0, readout: 0 }]);
    expect(readStructure(['b', 'a'], plan)).toEqual([]);
  });

  test('a pair is refused in words', () => {
    expect(() => sheetOf('quarter-turn-cz-2q/1', 1200)).toThrow('Structured sheets are drawn for gate classes of one qubit; quarter-turn-cz-2q/1 has more.');
  });
});

describe('the linear analysis of structured designs', () => {
  const circuits = sheetOf('quarter-turn-1q/1').sheet.patches[0]!.circuits;

  test('recovers a known truth from exact probabilities, SPAM errors and all: losses and unseen circuits to 1e-6', () => {
    const { patch, set, truth } = makeCase({ noise: 1e-3, coherent: 0.01, spam: 0.02, circuits, seed: 'structured truth' });
    const answer = structured(patch);
    if (!answer.ok) throw new Error(answer.reason);
    const found = lossesOf(set, answer.estimate.maps);
    lossesOf(set, truth).forEach((v, k) => expect(Math.abs(found[k]! - v)).toBeLessThan(1e-6));
    expect(farthest(set, answer.estimate.maps, truth, [{ gates: ['rx', 'ry', 'id', 'ry', 'rx', 'rx'] }, { gates: [] }])).toBeLessThan(1e-6);
    expect(answer.estimate.inverse.rank).toBe(answer.estimate.inverse.columns - 12);
  });

  test('from counts: gate losses within 3.5 of their own scatter over twelve datasets of one truth, and sealed circuits predicted better than by the ideal model', () => {
    const runs = Array.from({ length: 12 }, (_, run) => {
      const { patch, set, truth } = makeCase({ noise: 3e-3, coherent: 0.015, spam: 0.02, circuits, shots: 1000, seed: `structured ${run}` });
      const answer = structured(patch);
      if (!answer.ok) throw new Error(answer.reason);
      const found = lossesOf(set, answer.estimate.maps);
      // The truth differs from run to run, so what is collected is the error.
      return lossesOf(set, truth).map((v, k) => found[k]! - v);
    });
    for (let k = 0; k < 3; k++) {
      const errors = runs.map((r) => r[k]!);
      const mean = errors.reduce((s, v) => s + v, 0) / errors.length;
      const spread = Math.sqrt(errors.reduce((s, v) => s + (v - mean) ** 2, 0) / (errors.length - 1));
      expect(Math.abs(mean)).toBeLessThan((3.5 * spread) / Math.sqrt(errors.length));
      expect(spread).toBeLessThan(2e-3);
    }
  });

  test('gives every figure beside the official one, with its own prediction error on the sealed circuits', () => {
    const { data, gateClass, seal } = makeCase({ noise: 4e-3, coherent: 0.015, spam: 0.02, circuits, shots: 2000, sealed: 75, seed: 'structured opinion' });
    const { result } = estimate({ dataset: data, contentId: '3'.repeat(64), gateClass, seal, replicates: 100 });
    const opinion = new SecondOpinions({ dataset: data, gateClass, seal, official: result.figures }).opine('structured');
    expect(opinion.reason).toBeNull();
    expect(opinion.figures.map((f) => f.key)).toEqual(['retained-signal', 'error-per-gate', 'gate-loss', 'gate-loss', 'gate-loss', 'readout-loss']);
    for (const f of opinion.figures) expect(Math.abs(f.distance!)).toBeLessThan(8);
    expect(opinion.prediction!.circuits).toBe(75);
    expect(opinion.prediction!.value).toBeLessThan(opinion.prediction!.ideal);
  });

  test('labels and order of the dataset are no matter', () => {
    const { data, gateClass } = makeCase({ noise: 1e-3, coherent: 0.01, spam: 0.01, circuits, seed: 'renamed' });
    const names: Record<string, string> = { id: 'wait', rx: 'u', ry: 'v' };
    const renamed = structuredClone(data);
    renamed.gates = [...renamed.gates].reverse().map((g) => ({ ...g, label: names[g.label]! }));
    for (const c of renamed.patches[0]!.circuits) c.gates = c.gates.map((label) => names[label]!);
    const of = (dataset: typeof data) => new SecondOpinions({ dataset, gateClass, seal: null, official: [] }).opine('structured').figures;
    const plain = new Map(of(data).filter((f) => f.gate).map((f) => [names[f.gate!], f.value!]));
    for (const f of of(renamed).filter((g) => g.gate)) expect(Math.abs(f.value! - plain.get(f.gate!)!)).toBeLessThan(1e-10);
  });

  test('random circuits are told to have another form, a pair to be too large', () => {
    const { patch } = makeCase({ noise: 1e-3, spam: 0.01, count: 200, seed: 'random' });
    expect(structured(patch)).toEqual({ ok: false, reason: expect.stringMatching(/^Offered for structured run sheets: \d+ of 200 circuits are not a preparation sequence, a repeated block and a readout sequence\.$/) });
    expect(gateClassById('half-turn-1q/1')).not.toBeNull();
    const halves = makeCase({ gateClass: 'half-turn-1q/1', noise: 1e-3, spam: 0.01, circuits: sheetOf('half-turn-1q/1', 200).sheet.patches[0]!.circuits, seed: 'halves' });
    expect(structured(halves.patch)).toEqual({ ok: false, reason: expect.stringMatching(/^Not determined: the circuits determine \d+ of the \d+ combinations that sequences and gates allow/) });
  });
});
