/** Special cases with known answers: exact probabilities in, the exact figures out. */
import { describe, expect, test } from 'vitest';
import { ErrorPerGate } from '#shared/method/error-per-gate.ts';
import { Evaluator } from '#shared/method/evaluator.ts';
import { withoutLast } from '#shared/method/frequencies.ts';
import { GateLoss } from '#shared/method/gate-loss.ts';
import { idealGateSet, indexCircuits } from '#shared/method/gate-set.ts';
import { applyParameters, emptyMaps, layoutOf, type NoisyMaps } from '#shared/method/parameters.ts';
import { runPasses } from '#shared/method/passes.ts';
import { poseProblem } from '#shared/method/patch-problem.ts';
import { designMatrix } from '#shared/method/design.ts';
import { drawCircuits, makeNoisy, one, pairGates, QUARTER, seeded, slowProbabilities } from '#tests/shared/method/made.ts';

const gates = one('id', ['rx', QUARTER], ['ry', QUARTER]);

function lossesOf(maps: NoisyMaps): number[] {
  const set = idealGateSet(gates, [0]);
  return set.gates.map((g, k) => {
    const meter = new GateLoss(g, 4);
    meter.measure(maps.gates, 16 * k);
    return meter.loss;
  });
}

/** Losses of the truth and of the estimate from exact probabilities; 300 circuits of lengths 2 to 16. */
function fromExact(coherent: number, stochastic: number, text: string): { truth: number[]; found: number[]; first: number[]; settled: boolean } {
  const set = idealGateSet(gates, [0]);
  const g = seeded(text);
  const circuits = drawCircuits(gates, [2, 4, 8, 16], 300, g);
  const truth = makeNoisy(set, coherent, stochastic, 0.02, g);
  const problem = poseProblem(set, circuits.map((c) => ({ ...c, shots: 1000, counts: { 0: 500, 1: 500 } })));
  const passes = runPasses(problem, withoutLast(slowProbabilities(set, truth, circuits), circuits.length, 2));
  const read = (e: Float64Array) => {
    const maps = emptyMaps(set);
    applyParameters(set, problem.layout, e, maps);
    return lossesOf(maps);
  };
  return { truth: lossesOf(truth), found: read(passes.e), first: read(passes.first), settled: passes.settled };
}

describe('exact probabilities give the exact gate loss to 1e-6', () => {
  // A rotation of standard deviation a about each axis loses 1 − F_e ≈ 3a²/4; a shrinking of s loses 3s/4.
  const shares: [string, number, number][] = [
    ['0.1 %, wholly coherent', Math.sqrt(0.004 / 3), 0], ['0.1 %, half coherent', Math.sqrt(0.002 / 3), 0.00067], ['0.1 %, stochastic', 0, 0.00133], ['1 %, stochastic', 0, 0.0133],
  ];
  test.each(shares)('%s', (name, coherent, stochastic) => {
    for (let trial = 0; trial < 4; trial++) {
      const { truth, found, settled } = fromExact(coherent, stochastic, `${name} ${trial}`);
      expect(settled).toBe(true);
      truth.forEach((t, k) => expect(Math.abs(found[k]! - t)).toBeLessThan(1e-6));
    }
  });

  test('the single pass alone is off by more: the passes are what makes it exact', () => {
    const { truth, found, first } = fromExact(0.03, 0.002, 'single');
    const worst = (x: number[]) => Math.max(...x.map((v, k) => Math.abs(v - truth[k]!)));
    expect(worst(first)).toBeGreaterThan(30 * worst(found));
  });
});

describe.each([['one qubit', one('id', 'h', 't', ['rx', 0.3]), [0]], ['two qubits', pairGates('cx'), [0, 1]]] as const)('%s', (name, declared, qubits) => {
  const set = idealGateSet(declared, qubits);
  const g = seeded(`slow ${name}`);
  const circuits = [{ id: 'empty', gates: [] }, ...drawCircuits(declared, [1, 2, 3, 5, 8, 13], 120, g)];
  const maps = makeNoisy(set, 0.05, 0.02, 0.03, g);

  test('shared words and prefixes give the probabilities of the plain product to 1e-14', () => {
    const slow = slowProbabilities(set, maps, circuits);
    const rows = new Float64Array(circuits.length * (set.d - 1));
    new Evaluator(indexCircuits(set, circuits), set.gates.length, set.D, set.d - 1).run(maps, rows);
    withoutLast(slow, circuits.length, set.d).forEach((p, i) => expect(Math.abs(rows[i]! - p)).toBeLessThan(1e-14));
  });

  test('each row of the design is the derivative of its probability (central differences, 1e-7)', () => {
    const layout = layoutOf(set);
    const indexed = indexCircuits(set, circuits.slice(0, 30));
    const design = designMatrix(set, layout, indexed);
    const evaluator = new Evaluator(indexed, set.gates.length, set.D, set.d - 1);
    const noisy = emptyMaps(set);
    const at = (e: Float64Array) => {
      applyParameters(set, layout, e, noisy);
      const out = new Float64Array(evaluator.rows);
      evaluator.run(noisy, out);
      return out;
    };
    const direction = Float64Array.from({ length: layout.columns }, () => g.next() - 0.5);
    const step = 1e-5;
    const [up, down] = [at(direction.map((v) => v * step)), at(direction.map((v) => -v * step))];
    for (let i = 0; i < design.rows; i++) {
      let along = 0;
      for (let e = design.start[i]!; e < design.start[i + 1]!; e++) along += design.value[e]! * direction[design.index[e]!]!;
      expect(Math.abs((up[i]! - down[i]!) / (2 * step) - along)).toBeLessThan(1e-6);
    }
  });
});

test('error per gate of depolarising gates (shrinking 1 − s) is s·(D − 1)/D exactly', () => {
  for (const [declared, qubits] of [[gates, [0]], [pairGates('cz'), [0, 1]]] as const) {
    const set = idealGateSet(declared, qubits);
    const meter = new ErrorPerGate(set);
    expect(meter.defined).toBe(true);
    const noisy = (s: number) => Float64Array.from(set.gates.flatMap((g) => Array.from(g, (v, i) => (i < set.D ? v : v * (1 - s)))));
    // The first is found by power iteration, those after it from its vectors.
    for (const s of [0.01, 0.012, 0.2, -0.001]) expect(meter.measure(noisy(s))).toBeCloseTo((s * (set.D - 1)) / set.D, 13);
  }
});

test('error per gate is not defined where random circuits do not mix all errors: half turns, one gate, no entangling gate', () => {
  expect(new ErrorPerGate(idealGateSet(one('x', 'y', 'z'), [0])).defined).toBe(false);
  expect(new ErrorPerGate(idealGateSet(one(['rx', QUARTER]), [0])).defined).toBe(false);
  expect(new ErrorPerGate(idealGateSet(pairGates('cz').slice(0, 4), [0, 1])).defined).toBe(false);
  expect(new ErrorPerGate(idealGateSet(one('id', 'h', 't'), [0])).defined).toBe(true);
});

test('angle error is the over-rotation itself, and loss of a pure over-rotation is sin²(θ/2)', () => {
  for (const over of [0.03, -0.2]) {
    const turned = idealGateSet(one(['rx', QUARTER + over]), [0]);
    const meter = new GateLoss(idealGateSet(one(['rx', QUARTER]), [0]).gates[0]!, 4);
    meter.measure(turned.gates[0]!, 0);
    expect(meter.angle).toBeCloseTo(over, 13);
    expect(meter.loss).toBeCloseTo(Math.sin(over / 2) ** 2, 13);
  }
  expect(new GateLoss(idealGateSet(one('x'), [0]).gates[0]!, 4).turns).toBe(false);
  expect(new GateLoss(idealGateSet(one('s'), [0]).gates[0]!, 4).turns).toBe(true);
});

test('large noise: eigenvalues are matched by the optimal assignment, not each to its nearest', () => {
  // t has 1, 1, e^{±iπ/4}; a map that shrinks the turning plane to 0.3 leaves both nearest to 1.
  const t = idealGateSet(one('t'), [0]).gates[0]!;
  const noisy = t.map((v, i) => (i === 0 || i === 15 ? v : v * 0.3));
  const meter = new GateLoss(t, 4);
  meter.measure(noisy, 0);
  expect(meter.loss).toBeCloseTo(1 - (1 + 1 + 0.3 + 0.3) / 4, 13);
  expect(meter.angle).toBeCloseTo(0, 13);
});
