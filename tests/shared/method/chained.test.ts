import { describe, expect, test } from 'vitest';
import { perfectQubit } from '#api/demo/simulator/device-model.ts';
import { trueGateLoss, trueRetainedSignal } from '#api/demo/simulator/truth.ts';
import { createSimulator } from '#api/demo/simulator/circuit-simulator.ts';
import type { Dataset, Figure, PlainCircuit } from '#shared/formats/types.ts';
import { estimate } from '#shared/method/estimate.ts';
import { outcomeLabels } from '#shared/method/frequencies.ts';
import { lineGates, lineModel, linePatches, makeRegister } from '#tests/shared/method/chain/made-register.ts';
import { drawCircuits, seeded } from '#tests/shared/method/made.ts';

const all = (n: number): number[] => Array.from({ length: n }, (_, q) => q);
const asked = (n: number, count: number): PlainCircuit[] => drawCircuits(lineGates(n), [4, 8, 12], count, seeded(`asked ${n}`)).map((c) => ({ ...c, qubits: all(n) }));
const run = (dataset: Dataset, replicates: number, circuits: PlainCircuit[] = [], contentId = 'made') =>
  estimate({ dataset, contentId, gateClass: null, replicates, predict: { format: 'evenbeam.circuits', formatVersion: '1.0.0', circuits } });
const valueOf = (figures: readonly Figure[], key: string, gate: string | null = null): Figure => figures.find((f) => f.key === key && f.gate === gate)!;

describe('three qubits in a line, counts of a density-matrix simulator', () => {
  const gates = lineGates(3);
  const dataset = makeRegister('line of three', gates, linePatches(3, 250, 600));
  const circuits = asked(3, 30);
  const { result } = run(dataset, 300, circuits);

  test('the true loss of every gate lies within four standard errors', () => {
    for (const gate of gates) {
      const found = valueOf(result.figures, 'gate-loss', gate.label);
      expect(Math.abs(found.value! - trueGateLoss(lineModel(3), gate)) / found.standardError!, gate.label).toBeLessThan(4);
    }
  });

  test('the true readout loss lies within four standard errors', () => {
    const found = valueOf(result.figures, 'readout-loss');
    const truth = 1 - trueRetainedSignal(lineModel(3), gates, [{ id: 'empty', qubits: [0, 1, 2], gates: [] }]);
    expect(found.qubits).toEqual([0, 1, 2]);
    expect(Math.abs(found.value! - truth) / found.standardError!).toBeLessThan(4);
  });

  test('95 % intervals of unseen whole-register circuits hold the truth in 90 to 99 % of 240 outcomes', () => {
    const inside = result.predictions.flatMap((p, i) => {
      const truth = createSimulator(lineModel(3), gates, [0, 1, 2]).probabilities(circuits[i]!.gates);
      return outcomeLabels(3).map((label, o) => {
        const [low, high] = p.intervals![label]!;
        return truth[o]! >= low && truth[o]! <= high;
      });
    });
    const share = inside.filter(Boolean).length / inside.length;
    expect(inside).toHaveLength(240);
    expect(share).toBeGreaterThan(0.9);
    expect(share).toBeLessThan(0.99);
  });

  test('error per gate is given per one-qubit patch only, and no misfit is out of range', () => {
    expect(result.figures.filter((f) => f.key === 'error-per-gate').map((f) => f.qubits)).toEqual([[0], [1], [2]]);
    for (const patch of result.patches) expect(Math.abs(patch.misfit!.sigmas)).toBeLessThan(3.3);
    expect(result.patches.every((p) => p.settled && p.sound)).toBe(true);
  });

  test('fewer replicates are a prefix of more, and neither the estimate nor the misfit depends on how many there are', () => {
    const [few, more] = [run(dataset, 3, circuits.slice(0, 2)), run(dataset, 5, circuits.slice(0, 2))];
    few.result.figures.forEach((f, i) => {
      expect(f.value).toBe(more.result.figures[i]!.value);
      for (let b = 0; b < 3; b++) expect(few.replicates.values[i * 3 + b]).toBe(more.replicates.values[i * 5 + b]);
    });
    expect(few.result.patches).toEqual(more.result.patches);
    expect(few.result.patches).toEqual(result.patches);
    expect(few.result.predictions.map((p) => p.probabilities)).toEqual(more.result.predictions.map((p) => p.probabilities));
  });

  test('each patch has random numbers of its own: taking circuits from one leaves the replicates of the others alone', () => {
    const shorter = structuredClone(dataset);
    shorter.patches[0]!.circuits.length = 240;
    const [whole, cut] = [run(dataset, 3), run(shorter, 3)];
    const rowOf = (out: typeof whole, gate: string): number[] => {
      const i = out.result.figures.indexOf(valueOf(out.result.figures, 'gate-loss', gate));
      return Array.from(out.replicates.values.subarray(3 * i, 3 * i + 3));
    };
    for (const gate of ['rx1', 'ry2', 'cz12']) expect(rowOf(cut, gate), gate).toEqual(rowOf(whole, gate));
    for (const gate of ['rx0', 'cz01']) expect(rowOf(cut, gate), gate).not.toEqual(rowOf(whole, gate));
    // Two patches with the same circuits and counts do not share their draws.
    expect(rowOf(whole, 'rx1')).not.toEqual(rowOf(whole, 'rx2'));
  });

  test('the order in which a pair names its qubits changes no figure and no prediction', () => {
    const turned = structuredClone(dataset);
    turned.patches[3]!.qubits = [1, 0];
    for (const c of turned.patches[3]!.circuits) c.counts = Object.fromEntries(Object.entries(c.counts).map(([o, k]) => [[...o].reverse().join(''), k]));
    const [a, b] = [run(dataset, 2, circuits), run(turned, 2, circuits)];
    expect(Math.abs(valueOf(a.result.figures, 'gate-loss', 'cz01').value! - valueOf(b.result.figures, 'gate-loss', 'cz01').value!)).toBeLessThan(1e-10);
    a.result.predictions.forEach((p, i) => Object.entries(p.probabilities!).forEach(([o, v]) => expect(Math.abs(v - b.result.predictions[i]!.probabilities![o]!)).toBeLessThan(1e-10)));
  });
});

test('from five qubits on whole circuits and figures are read from 200 replicates, said in the figure; gates keep all of theirs', () => {
  const { result } = run(makeRegister('line of five', lineGates(5), linePatches(5, 100, 400)), 230, asked(5, 1));
  expect(valueOf(result.figures, 'readout-loss')).toMatchObject({ determined: true, replicates: 200 });
  expect(valueOf(result.figures, 'gate-loss', 'rx4').replicates).toBe(230);
  expect(Object.keys(result.predictions[0]!.probabilities!)).toHaveLength(32);
  expect(result.replicates).toBe(230);
});

test('nine qubits: figures of single gates stand, whole-register ones are null: register too large; circuits of up to eight are predicted', () => {
  const n = 9;
  const dataset = makeRegister('nine', lineGates(n), linePatches(n, 60, 300).slice(0, n + 1).concat(linePatches(n, 0, 1).slice(n + 1)));
  const circuits: PlainCircuit[] = [{ id: 'nine', qubits: all(n), gates: ['rx0'] }, { id: 'eight', qubits: all(8), gates: ['rx0', 'cz01', 'ry1', 'rx7'] }, { id: 'weak', qubits: [4, 5], gates: ['cz45'] }];
  const { result } = run(dataset, 4, circuits);
  expect(valueOf(result.figures, 'readout-loss')).toMatchObject({ value: null, determined: false, reason: 'register too large' });
  expect(valueOf(result.figures, 'gate-loss', 'rx8').value).not.toBeNull();
  expect(valueOf(result.figures, 'gate-loss', 'cz01').value).not.toBeNull();
  expect(result.predictions.map((p) => [p.determined, p.reason?.slice(0, 40) ?? null])).toEqual([[false, 'register too large'], [true, null], [false, 'not determined: unsound pair q4 and q5']]);
  expect(Object.values(result.predictions[1]!.probabilities!)).toHaveLength(256);
  expect(Math.abs(Object.values(result.predictions[1]!.probabilities!).reduce((a, b) => a + b, 0) - 1)).toBeLessThan(1e-12);
});

test('a pair patch without a gate of its own is left out with a warning; two gates of one pair are estimated together', () => {
  const gates = [...lineGates(2), { label: 'cx10', targets: [1, 0], ideal: { gate: 'cx' } }];
  const model = { qubits: [perfectQubit, perfectQubit, perfectQubit], pairs: lineModel(2).pairs };
  const local = { label: 'rx2', targets: [2], ideal: { gate: 'rx', params: [Math.PI / 2] } };
  const other = { label: 'ry2', targets: [2], ideal: { gate: 'ry', params: [Math.PI / 2] } };
  const dataset = makeRegister('two gates', [...gates, local, other], [...linePatches(3, 200, 700).slice(0, 4), { qubits: [1, 2], count: 10, lengths: [4] }], 'custom', model);
  const { result } = run(dataset, 10);
  expect(result.patches.map((p) => [p.qubits, p.columns])).toEqual([[[0], 31], [[1], 31], [[2], 31], [[0, 1], 480]]);
  expect(result.patches[3]).toMatchObject({ rank: 480, sound: true, settled: true });
  expect(result.patches[3]!.gateMaps.map((m) => m.gate)).toEqual(['cz01', 'cx10']);
  expect(result.warnings).toContain('Patch of q1 and q2: No gate acts on both of these qubits, so nothing is estimated from it.');
  for (const gate of ['cz01', 'cx10']) expect(valueOf(result.figures, 'gate-loss', gate).determined).toBe(true);
});
