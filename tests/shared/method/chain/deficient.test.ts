import { describe, expect, test } from 'vitest';
import { contentIdOf } from '#shared/formats/canonical-json.ts';
import type { Figure } from '#shared/formats/types.ts';
import { all } from '#shared/formats/validators.js';
import { estimate } from '#shared/method/estimate.ts';
import { judgeDesign } from '#shared/method/judge-design.ts';
import { lineGates, makeRegister } from '#tests/shared/method/chain/made-register.ts';
import { drawCircuits, pairGates, seeded } from '#tests/shared/method/made.ts';

// Rank and ratio recomputed from the same circuits with numpy 2.4.6 (full SVD, cut 1e-9): equal, ratios to 7e-16, the third to 1e-14.
test.each([
  { length: 5, count: 700, rank: 199, ratio: 0.013604812737623808 },
  { length: 7, count: 300, rank: 223, ratio: 0.016356723253281767 },
  { length: 7, count: 560, rank: 239, ratio: 0.006028565866668868 },
])('$count pair circuits of length $length hold rank $rank of 240 at the ideal local gates, and are not sound', ({ length, count, rank, ratio }) => {
  const gates = pairGates('cz');
  const judged = judgeDesign({ gates, qubits: [0, 1], circuits: drawCircuits(gates, [length], count, seeded('x')), pairOfChain: true });
  expect([judged.columns, judged.gaugeDimension, judged.rank, judged.rankAmbiguous, judged.sound(240)]).toEqual([240, 0, rank, false, false]);
  expect(Math.abs(judged.conditionRatio / ratio - 1)).toBeLessThan(1e-9);
});

describe('a register whose second pair has circuits of length 5 only', () => {
  const gates = lineGates(3);
  const patches = [0, 1, 2].map((q) => ({ qubits: [q], count: 200, lengths: [2, 4, 8, 16] }));
  const dataset = makeRegister('deficient', gates, [...patches, { qubits: [0, 1], count: 450, lengths: [4, 8, 12, 16] }, { qubits: [1, 2], count: 700, lengths: [5] }]);
  const ask = (id: string, qubits: number[], labels: string[]) => ({ id, qubits, gates: labels });
  const { result } = estimate({
    dataset, contentId: contentIdOf(dataset), gateClass: null, replicates: 20,
    predict: { format: 'evenbeam.circuits', formatVersion: '1.0.0', circuits: [ask('sound', [2, 1, 0], ['rx2', 'cz01', 'ry0']), ask('unsound', [0, 1, 2], ['rx1', 'cz12']), ask('alone', [2], ['rx2', 'ry2'])] },
  });
  const of = (key: string, gate: string): Figure => result.figures.find((f) => f.key === key && f.gate === gate)!;

  test('the pair is reported at the ideal local gates, without misfit or maps, and its gate is not determined: unsound pair', () => {
    const pair = result.patches.find((p) => p.qubits.join() === '1,2')!;
    const { rank } = judgeDesign({ gates, qubits: [1, 2], circuits: dataset.patches[4]!.circuits, pairOfChain: true });
    expect(rank).toBeLessThan(210);
    expect(pair).toMatchObject({ columns: 240, gaugeDimension: 0, rank, complete: false, sound: false, misfit: null, gateMaps: [] });
    expect(all.resultShell(JSON.parse(JSON.stringify(result))), JSON.stringify(all.resultShell.errors)).toBe(true);
    expect(of('gate-loss', 'cz12')).toMatchObject({ value: null, determined: false, intervals: null });
    expect(of('gate-loss', 'cz12').reason).toMatch(/^unsound pair/);
    expect(result.warnings.some((w) => w.startsWith('Patch of q1 and q2:') && w.includes('unsound pair'))).toBe(true);
  });

  test('the other pair and every one-qubit patch stand', () => {
    expect(of('gate-loss', 'cz01').value).toBeGreaterThan(0);
    expect(result.figures.filter((f) => f.key === 'error-per-gate').map((f) => [f.qubits, f.determined])).toEqual([[[0], true], [[1], true], [[2], true]]);
  });

  test('circuits are refused exactly where they use the gate of the unsound pair', () => {
    expect(result.predictions.map((p) => p.determined)).toEqual([true, false, true]);
    expect(result.predictions[1]).toMatchObject({ probabilities: null, intervals: null });
    expect(result.predictions[1]!.reason).toContain('unsound pair q1 and q2');
  });
});

test('a one-qubit patch that is incomplete: its pair and every circuit that touches it are not determined, the rest stands', () => {
  const gates = lineGates(2).concat({ label: 'h0', targets: [0], ideal: { gate: 'h' } });
  const dataset = makeRegister('incomplete', gates, [{ qubits: [0], count: 200, lengths: [1] }, { qubits: [1], count: 200, lengths: [2, 4, 8, 16] }, { qubits: [0, 1], count: 450, lengths: [4, 8, 12, 16] }]);
  const circuits = [{ id: 'a', qubits: [0], gates: ['rx0'] }, { id: 'b', qubits: [1], gates: ['rx1'] }, { id: 'c', qubits: [1, 0], gates: ['rx1', 'cz01'] }];
  const { result } = estimate({ dataset, contentId: 'incomplete', gateClass: null, replicates: 20, predict: { format: 'evenbeam.circuits', formatVersion: '1.0.0', circuits } });
  expect(result.patches.map((p) => [p.complete, p.sound])).toEqual([[false, false], [true, true], [true, true]]);
  expect(result.predictions.map((p) => p.determined)).toEqual([false, true, false]);
  expect(result.predictions[0]!.reason).toContain('the patch of q0 is incomplete');
  expect(result.figures.find((f) => f.gate === 'cz01')).toMatchObject({ value: null, reason: 'not determined: a one-qubit patch of the pair is incomplete' });
  expect(result.figures.find((f) => f.key === 'readout-loss')).toMatchObject({ value: null, determined: false });
  expect(result.figures.find((f) => f.gate === 'rx1')!.value).not.toBeNull();
});
