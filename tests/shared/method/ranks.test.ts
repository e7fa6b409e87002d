/**
 * Ranks and gauge dimensions of the method's table of gate sets; counts total = g·d²(d² − 1) + (d² − 1) + (m − 1)d², gauge = d²(d² − 1)
 * ("Gate set tomography", Quantum 5, 557, 2021; memory, ranks recomputed). Ratios were measured, hence ranges.
 */
import { describe, expect, test } from 'vitest';
import type { GateDeclaration } from '#shared/formats/types.ts';
import { isCompleteAndSound, judgeDesign } from '#shared/method/judge-design.ts';
import { designMatrix } from '#shared/method/design.ts';
import { gaugeDirections } from '#shared/method/gauge.ts';
import { idealGateSet, indexCircuits } from '#shared/method/gate-set.ts';
import { fastInverse } from '#shared/method/fast-inverse.ts';
import { svdInverse } from '#shared/method/inverse.ts';
import { layoutOf } from '#shared/method/parameters.ts';
import { drawCircuits, one, pairGates, QUARTER, seeded } from '#tests/shared/method/made.ts';

const LENGTHS = [2, 4, 8, 16];
const table: [string, GateDeclaration[], number[], number, number, number, number, number | null, number | null][] = [
  ['id, rx(π/2), ry(π/2)', one('id', ['rx', QUARTER], ['ry', QUARTER]), LENGTHS, 43, 12, 31, 250, 0.09, 0.19],
  ['rx(π/2), ry(π/2)', one(['rx', QUARTER], ['ry', QUARTER]), LENGTHS, 31, 12, 19, 250, 0.12, 0.3],
  ['id, h, t', one('id', 'h', 't'), LENGTHS, 43, 12, 31, 300, 0.008, 0.05],
  ['id, h, t, one length 8', one('id', 'h', 't'), [8], 43, 12, 30, 250, 0.003, 0.03],
  ['x, y, z', one('x', 'y', 'z'), LENGTHS, 43, 10, 7, 150, 0.1, 0.3],
  ['rx(π/2) alone', one(['rx', QUARTER]), [1, 2, 3, 4, 5, 6, 7, 8], 19, 11, 5, 60, null, null],
];

describe.each(table)('%s', (name, gates, lengths, columns, gauge, rank, count, low, high) => {
  const circuits = drawCircuits(gates, lengths, count, seeded(`rank ${name}`));
  const judged = judgeDesign({ gates, qubits: [0], circuits });

  test(`${columns} columns, gauge dimension ${gauge}, rank ${rank}, not ambiguous`, () => {
    expect([judged.columns, judged.gaugeDimension, judged.rank, judged.rankAmbiguous]).toEqual([columns, gauge, rank, false]);
    expect(judged.complete).toBe(rank === columns - gauge);
    if (low !== null && high !== null) {
      expect(judged.conditionRatio).toBeGreaterThan(low);
      expect(judged.conditionRatio).toBeLessThan(high);
    }
  });

  test('sound by its own expected rank where the ratio allows, and the quick judgement agrees', () => {
    expect(judged.sound(rank)).toBe(judged.conditionRatio >= 0.01);
    expect(isCompleteAndSound({ gates, qubits: [0], circuits })).toBe(judged.sound());
  });

  test('the closed form is accepted exactly for complete sets, and then equals the SVD to 1e-10', () => {
    const set = idealGateSet(gates, [0]);
    const layout = layoutOf(set);
    const design = designMatrix(set, layout, indexCircuits(set, circuits));
    const fast = fastInverse(design, gaugeDirections(set, layout));
    expect(fast !== null).toBe(judged.complete);
    if (!fast) return;
    const slow = svdInverse(design);
    expect(Math.abs(fast.conditionRatio / slow.conditionRatio - 1)).toBeLessThan(1e-10);
    const g = seeded('right-hand sides');
    const x = Float64Array.from({ length: 8 * design.rows }, () => g.next() - 0.5);
    const [a, b] = [new Float64Array(8 * columns), new Float64Array(8 * columns)];
    fast.apply(x, a, 2);
    slow.apply(x, b, 2);
    a.forEach((v, i) => expect(Math.abs(v - b[i]!)).toBeLessThan(1e-10));
    const w = x.slice(0, columns);
    const [c, d] = [fast.applyTranspose(w), slow.applyTranspose(w)];
    c.forEach((v, i) => expect(Math.abs(v - d[i]!)).toBeLessThan(1e-10));
  });
});

test.each(['cz', 'cx'])('rx and ry of each of two qubits and %s: 1263 columns, gauge 240, rank 1023, ratio 0.015 to 0.04 with lengths 4 to 16', (entangling) => {
  const gates = pairGates(entangling);
  const circuits = drawCircuits(gates, [4, 8, 12, 16], 1200, seeded(`pair ${entangling}`));
  const judged = judgeDesign({ gates, qubits: [0, 1], circuits });
  expect([judged.columns, judged.gaugeDimension, judged.rank, judged.complete]).toEqual([1263, 240, 1023, true]);
  expect(judged.conditionRatio).toBeGreaterThan(0.015);
  expect(judged.conditionRatio).toBeLessThan(0.04);
  expect(judged.sound(1023)).toBe(true);
  expect(judged.sound(1022)).toBe(false);
});

test('a pair of a chained register: 240 columns for its entangling gate, gauge 0, rank 240, ratio at least 0.01', () => {
  const gates = pairGates('cz');
  const judged = judgeDesign({ gates, qubits: [0, 1], circuits: drawCircuits(gates, [4, 8, 12, 16], 600, seeded('chain')), pairOfChain: true });
  expect([judged.columns, judged.gaugeDimension, judged.rank]).toEqual([240, 0, 240]);
  expect(judged.sound(240)).toBe(true);
});

test('gauge directions are invisible to the design to rounding', () => {
  const gates = one('id', 'h', 't');
  const set = idealGateSet(gates, [0]);
  const layout = layoutOf(set);
  const design = designMatrix(set, layout, indexCircuits(set, drawCircuits(gates, LENGTHS, 50, seeded('gauge'))));
  const { basis, dimension } = gaugeDirections(set, layout);
  for (let q = 0; q < dimension; q++) {
    for (let i = 0; i < design.rows; i++) {
      let s = 0;
      for (let e = design.start[i]!; e < design.start[i + 1]!; e++) s += design.value[e]! * basis[q * layout.columns + design.index[e]!]!;
      expect(Math.abs(s)).toBeLessThan(1e-13);
    }
  }
});
