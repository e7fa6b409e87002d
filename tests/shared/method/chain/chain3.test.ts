/**
 * Outside reference: tests/reference/m1/chain3, an estimate computed with an independent numpy implementation of the method.
 */
import { expect, test } from 'vitest';
import { gateClassById } from '#shared/domain/gate-classes.ts';
import { all } from '#shared/formats/validators.js';
import { estimate } from '#shared/method/estimate.ts';
import type { Expected } from '#tests/shared/method/worked-example.ts';
import { workedExample } from '#tests/shared/method/worked-example.ts';

const { dataset, circuits, contentId, expected: file } = workedExample('chain3');
const expected = file as Expected & { soundAtIdeal: Record<string, [rank: number, ratio: number]>; truth: { probabilities: Record<string, Record<string, number>> } };
const { result } = estimate({ dataset, contentId, gateClass: gateClassById(dataset.gateClass), predict: circuits, replicates: 200 });

test('every whole-register prediction and every gate loss of a pair agrees to 1e-9', () => {
  expect(result.predictions).toHaveLength(60);
  for (const { id, probabilities } of result.predictions) {
    for (const [outcome, p] of Object.entries(expected.predictions[id]!)) expect(Math.abs(probabilities![outcome]! - p), `${id} ${outcome}`).toBeLessThan(1e-9);
  }
  for (const [gate, loss] of Object.entries(expected.gateLoss!)) {
    const found = result.figures.find((f) => f.key === 'gate-loss' && f.gate === gate);
    expect(Math.abs(found!.value! - loss), gate).toBeLessThan(1e-9);
  }
});

test('the result follows its schema', () => {
  const valid = all.resultShell(JSON.parse(JSON.stringify(result)));
  expect(all.resultShell.errors ?? []).toEqual([]);
  expect(valid).toBe(true);
});

test('pairs are judged at the ideal local gates: rank and ratio agree to 1e-9, gauge dimension 0', () => {
  for (const [name, [rank, ratio]] of Object.entries(expected.soundAtIdeal)) {
    const patch = result.patches.find((p) => JSON.stringify(p.qubits) === name.replace(' ', ''))!;
    expect(patch).toMatchObject({ rank, columns: 240, gaugeDimension: 0, sound: true, rankAmbiguous: false, complete: true });
    expect(Math.abs(patch.conditionRatio / ratio - 1), name).toBeLessThan(1e-9);
  }
});

test('95 % intervals of whole-register predictions cover the simulated device in 90 to 99 % of 480 outcomes', () => {
  const inside = result.predictions.flatMap(({ id, intervals }) =>
    Object.entries(expected.truth.probabilities[id]!).map(([outcome, p]) => p >= intervals![outcome]![0] && p <= intervals![outcome]![1]));
  const share = inside.filter(Boolean).length / inside.length;
  expect(inside).toHaveLength(480);
  expect(share).toBeGreaterThan(0.9);
  expect(share).toBeLessThan(0.99);
});
