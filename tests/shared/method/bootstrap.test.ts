import { describe, expect, test } from 'vitest';
import type { Figure, Result } from '#shared/formats/types.ts';
import { gateClassById } from '#shared/domain/gate-classes.ts';
import { estimate } from '#shared/method/estimate.ts';
import { forecast } from '#shared/method/forecast.ts';
import { idealGateSet } from '#shared/method/gate-set.ts';
import { runPasses } from '#shared/method/passes.ts';
import { poseProblem } from '#shared/method/patch-problem.ts';
import { drawReplicates } from '#shared/method/replicates.ts';
import { openStream } from '#shared/random/streams.ts';
import { moments } from '#shared/stats/moments.ts';
import { dataset, drawCircuits, drawCounts, makeNoisy, seeded, slowProbabilities } from '#tests/shared/method/made.ts';
import { workedExample } from '#tests/shared/method/worked-example.ts';

const gateClass = gateClassById('quarter-turn-1q/1')!;

describe('bootstrap variance of a linear figure = WΣWᵀ, Σ = (diag(s) − ssᵀ)/N, within 3/√(2B)', () => {
  test('each parameter of the single pass, worked example quarter', () => {
    const { dataset: data, contentId } = workedExample('quarter');
    const patch = data.patches[0]!;
    const problem = poseProblem(idealGateSet(data.gates, patch.qubits), patch.circuits);
    const passes = runPasses(problem);
    const B = 2000;
    // With the passes taken as stopped a replicate is the centred step alone, which is linear in the frequencies.
    const { parameters } = drawReplicates(problem, { ...passes, stopped: true }, B, openStream(contentId, 'M1', 'replicates'));
    const { columns } = problem.layout;
    for (let t = 0; t < 12; t++) {
      const w = new Float64Array(columns);
      w[3 * t] = 1;
      w[3 * t + 1] = -0.5;
      const weights = problem.inverse.applyTranspose(w);
      let variance = 0;
      problem.smoothed.forEach((s, i) => (variance += (weights[i]! * weights[i]! * s * (1 - s)) / problem.counts.shots[i]!));
      const values = Array.from({ length: B }, (_, b) => w.reduce((s, v, j) => s + v * parameters[b * columns + j]!, 0));
      expect(Math.abs(moments(values).deviation ** 2 / variance - 1)).toBeLessThan((3 * 2) / Math.sqrt(2 * B));
    }
  });
});

function find(result: Result, key: string, gate: string | null = null, depth: number | null = null): Figure {
  return result.figures.find((f) => f.key === key && f.gate === gate && f.depth === depth)!;
}

test('a forecast made before a shot is taken meets the standard errors of a nearly ideal device within a fifth', () => {
  const g = seeded('forecast');
  const circuits = drawCircuits(gateClass.gates, gateClass.lengths, 300, g);
  const set = idealGateSet(gateClass.gates, [0]);
  const maps = makeNoisy(set, 0.002, 0.0005, 0.02, g);
  const data = dataset(gateClass.gates, drawCounts(circuits, slowProbabilities(set, maps, circuits), 1, 1000, g), gateClass.id);
  const { result } = estimate({ dataset: data, contentId: 'forecast', gateClass, replicates: 800 });
  const bench = gateClass.bench.map((b) => ({ depth: b.depth, circuits: b.circuits }));
  const told = forecast({ gates: gateClass.gates, qubits: [0], circuits, shots: 1000, bench, readoutError: 0.03 });
  expect(told.complete).toBe(true);
  expect(told.figures.length).toBeGreaterThan(12);
  for (const f of told.figures) {
    const ratio = f.standardError! / find(result, f.key, f.gate, f.depth).standardError!;
    expect(ratio, `${f.key} ${f.gate} ${f.depth}`).toBeGreaterThan(0.8);
    expect(ratio, `${f.key} ${f.gate} ${f.depth}`).toBeLessThan(1.25);
  }
  const four = forecast({ gates: gateClass.gates, qubits: [0], circuits, shots: 4000, bench, readoutError: 0.03 });
  four.figures.forEach((f, i) => expect(f.standardError! * 2).toBeCloseTo(told.figures[i]!.standardError!, 12));
});

test('a forecast says what the circuits cannot determine', () => {
  const half = gateClassById('half-turn-1q/1')!;
  const told = forecast({ gates: half.gates, qubits: [0], circuits: drawCircuits(half.gates, half.lengths, 200, seeded('half')), shots: 1000, bench: half.bench });
  expect(told.complete).toBe(false);
  for (const f of told.figures) expect(f.standardError === null, `${f.key} ${f.depth}`).toBe(f.key === 'gate-loss' || f.key === 'error-per-gate');
});

describe('determinism', () => {
  const { dataset: data, contentId, circuits } = workedExample('quarter');
  const input = { dataset: data, contentId, gateClass, predict: circuits };

  test('two runs give the same bytes', () => {
    const [a, b] = [estimate({ ...input, replicates: 60 }), estimate({ ...input, replicates: 60 })];
    expect(JSON.stringify(a.result)).toBe(JSON.stringify(b.result));
    expect(Buffer.from(a.replicates.values.buffer).equals(Buffer.from(b.replicates.values.buffer))).toBe(true);
  });

  test('fewer replicates are a prefix of more, and the estimate does not depend on how many there are', () => {
    const [few, many] = [estimate({ ...input, replicates: 37 }), estimate({ ...input, replicates: 150 })];
    expect(few.replicates.figures).toBe(many.replicates.figures);
    for (let i = 0; i < few.replicates.figures; i++) {
      expect(Array.from(few.replicates.values.subarray(i * 37, (i + 1) * 37))).toEqual(Array.from(many.replicates.values.subarray(i * 150, i * 150 + 37)));
    }
    few.result.figures.forEach((f, i) => expect(f.value).toBe(many.result.figures[i]!.value));
    expect(few.result.patches).toEqual(many.result.patches);
  });

  test('another content id draws other replicates and leaves the estimate alone', () => {
    const [a, b] = [estimate({ ...input, replicates: 20 }), estimate({ ...input, contentId: 'ff', replicates: 20 })];
    expect(a.result.figures.map((f) => f.value)).toEqual(b.result.figures.map((f) => f.value));
    expect(a.result.figures.map((f) => f.standardError)).not.toEqual(b.result.figures.map((f) => f.standardError));
  });

  test('the counts may come in any order and with zeros left out', () => {
    const patch = data.patches[0]!;
    const turned = { ...data, patches: [{ ...patch, circuits: patch.circuits.map((c) => ({ ...c, counts: Object.fromEntries(Object.entries(c.counts).reverse().filter(([, n]) => n > 0)) })) }] };
    expect(JSON.stringify(estimate({ ...input, dataset: turned, replicates: 10 }).result)).toBe(JSON.stringify(estimate({ ...input, replicates: 10 }).result));
  });
});
