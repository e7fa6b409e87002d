import { readFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { describe, expect, test } from 'vitest';
import { carriesSignal, writeGateClasses } from '#api/cli/make-gate-classes.ts';
import { idealProbabilities } from '#api/lib/state-vector.ts';
import { gateClassById, gateClasses } from '#shared/domain/gate-classes.ts';
import { checkGates } from '#shared/formats/check-gates.ts';
import { checkSchema } from '#shared/formats/check-schema.ts';
import { Faults } from '#shared/formats/faults.ts';
import type { GateClass } from '#shared/formats/types.ts';
import { idealGateSet } from '#shared/method/gate-set.ts';

const folder = fileURLToPath(new URL('../../schema/gate-class/', import.meta.url));

/** Outcome probabilities through Pauli transfer matrices: another route than the state vectors that chose the circuits. */
function byTransferMatrices(gateClass: GateClass): (circuit: readonly string[]) => number[] {
  const set = idealGateSet(gateClass.gates, Array.from({ length: gateClass.registerSize }, (_, q) => q));
  return (circuit) => {
    let state = set.state;
    for (const label of circuit) {
      const gate = set.gates[set.labels.indexOf(label)] ?? new Float64Array();
      state = state.map((_, row) => state.reduce((sum, x, column) => sum + (gate[row * set.D + column] ?? NaN) * x, 0));
    }
    return set.effects.map((effect) => effect.reduce((sum, m, i) => sum + m * (state[i] ?? NaN), 0));
  };
}

test('the eight classes, in the order of the boards', () => {
  expect(gateClasses.map(({ id, registerSize, kind, ranked, expectedRank }) => [id, registerSize, kind, ranked, expectedRank])).toEqual([
    ['quarter-turn-1q/1', 1, 'joint', true, 31], ['clifford-t-1q/1', 1, 'joint', true, 31], ['half-turn-1q/1', 1, 'joint', false, 7], ['quarter-turn-cz-2q/1', 2, 'joint', true, 1023],
    ['chained-cz-2q/1', 2, 'chained', true, 240], ['chained-cz-3q/1', 3, 'chained', true, 240], ['chained-cz-4q/1', 4, 'chained', true, 240], ['chained-cz-5q/1', 5, 'chained', true, 240],
  ]);
});

test('the files are what the generator writes: none is overwritten, none differs', () => {
  expect(writeGateClasses(folder)).toEqual(gateClasses.map(({ id }) => `${id}: as written before`));
});

test('a class cannot be changed by whoever holds it', () => {
  const gateClass = gateClassById('quarter-turn-1q/1');
  expect(() => { (gateClass as { title: string }).title = 'x'; }).toThrow(TypeError);
  expect(() => gateClass?.bench[0]?.circuits.push({ id: 'x', qubits: [0], gates: [] })).toThrow(TypeError);
  expect(gateClassById('custom')).toBeNull();
  expect(gateClassById('toString')).toBeNull();
});

describe.each(gateClasses.map((gateClass) => [gateClass.id, gateClass] as const))('%s', (id, gateClass) => {
  test('fits its schema; its gates are sound', () => {
    expect(checkSchema('gateClass', JSON.parse(readFileSync(`${folder}${id}.json`, 'utf8')))).toEqual([]);
    const faults = new Faults();
    checkGates(gateClass.gates, gateClass.registerSize, faults);
    expect(faults.list).toEqual([]);
    expect(gateClass.gates.map(({ label }) => label)).toEqual(expect.arrayContaining(gateClass.drawing));
  });

  test('bench circuits: depth 0 the empty circuit, depth 1 each gate once, then forty of each depth on the whole register', () => {
    const qubits = Array.from({ length: gateClass.registerSize }, (_, q) => q);
    expect(gateClass.bench.map(({ depth, circuits }) => [depth, circuits.length])).toEqual([[0, 1], [1, gateClass.gates.length], ...[4, 8, 16, 32, 64].map((depth) => [depth, 40])]);
    expect(gateClass.bench[1]?.circuits.map(({ gates }) => gates)).toEqual(gateClass.gates.map(({ label }) => [label]));
    for (const { depth, circuits } of gateClass.bench) for (const circuit of circuits) expect([circuit.gates.length, circuit.qubits]).toEqual([depth, qubits]);
    const ids = gateClass.bench.flatMap(({ circuits }) => circuits.map((circuit) => circuit.id));
    expect(new Set(ids).size).toBe(ids.length);
  });

  test('every gate is drawn about equally often in the circuits of depth 64, up to what the choice by signal bends', () => {
    const gates = gateClass.bench.at(-1)?.circuits.flatMap((circuit) => circuit.gates) ?? [];
    const even = gates.length / gateClass.gates.length;
    for (const { label } of gateClass.gates) expect(Math.abs(gates.filter((gate) => gate === label).length - even)).toBeLessThan(6 * Math.sqrt(even));
  });

  // A register of four or five has transfer matrices of 256 or 1,024 rows: those are checked through state vectors alone.
  test('every bench circuit from depth 4 on carries signal', () => {
    const probabilities = gateClass.registerSize <= 3 ? byTransferMatrices(gateClass) : (circuit: readonly string[]) => idealProbabilities(gateClass.gates, gateClass.registerSize, circuit);
    for (const { circuits } of gateClass.bench.filter(({ depth }) => depth >= 4)) {
      for (const { gates } of circuits) {
        const p = probabilities(gates);
        expect(Math.abs(p.reduce((sum, x) => sum + x, 0) - 1)).toBeLessThan(1e-12);
        expect(carriesSignal(p)).toBe(true);
      }
    }
  });
});

test('the rule of signal: a certain outcome passes, even odds do not, the bound itself passes', () => {
  expect(carriesSignal([1, 0])).toBe(true);
  expect(carriesSignal([0.5, 0.5])).toBe(false);
  const edge = Math.sqrt(1 / 24);
  expect(carriesSignal([0.5 + edge * (1 + 1e-12), 0.5 - edge * (1 + 1e-12)])).toBe(true);
  expect(carriesSignal([0.5 + edge * (1 - 1e-9), 0.5 - edge * (1 - 1e-9)])).toBe(false);
});
