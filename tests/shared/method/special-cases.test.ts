import { describe, expect, test } from 'vitest';
import { gateClassById } from '#shared/domain/gate-classes.ts';
import type { DatasetCircuit, GateClass, Result, Seal } from '#shared/formats/types.ts';
import { estimate } from '#shared/method/estimate.ts';
import { idealGateSet } from '#shared/method/gate-set.ts';
import { dataset, drawCircuits, drawCounts, makeNoisy, one, seeded, slowProbabilities } from '#tests/shared/method/made.ts';
import { workedExample } from '#tests/shared/method/worked-example.ts';

function made(gateClass: GateClass, text: string, options: { coherent?: number; stochastic?: number; lengths?: number[]; count?: number } = {}): DatasetCircuit[] {
  const g = seeded(text);
  const set = idealGateSet(gateClass.gates, [0]);
  const circuits = drawCircuits(gateClass.gates, options.lengths ?? gateClass.lengths, options.count ?? 250, g);
  return drawCounts(circuits, slowProbabilities(set, makeNoisy(set, options.coherent ?? 0.01, options.stochastic ?? 0.002, 0.02, g), circuits), 1, 1000, g);
}

const quarter = gateClassById('quarter-turn-1q/1')!;

describe('the half-turn class: rank 7, predictions only', () => {
  const half = gateClassById('half-turn-1q/1')!;
  const circuits = made(half, 'half turn', { coherent: 0, stochastic: 0.001 });
  const { result } = estimate({ dataset: dataset(half.gates, circuits, half.id), contentId: 'half', gateClass: half, replicates: 200, predict: { format: 'evenbeam.circuits', formatVersion: '1.0.0', circuits: [{ id: 'p', qubits: [0], gates: half.gates.map((g) => g.label) }] } });

  test('its rank is that of the class, so it is sound, but not complete', () => {
    expect([result.patches[0]!.rank, result.patches[0]!.sound, result.patches[0]!.complete]).toEqual([7, true, false]);
  });

  test('signal and output error are given to first order only, gate figures are not determined', () => {
    for (const f of result.figures) {
      if (['retained-signal', 'output-error', 'readout-loss'].includes(f.key)) {
        expect(f.value, `${f.key} ${f.depth}`).not.toBeNull();
        expect(f.firstOrderOnly).toBe(true);
      } else {
        expect(f.value, f.key).toBeNull();
        expect(f.reason).not.toBeNull();
        expect(f.intervals).toBeNull();
      }
    }
    expect(result.predictions[0]!.firstOrderOnly).toBe(true);
    expect(result.predictions[0]!.probabilities).not.toBeNull();
    expect(result.warnings.some((w) => w.includes('first order only'))).toBe(true);
  });
});

test('the worked example half does not fit the first-order model: probabilities stand, intervals are withheld, with a warning', () => {
  const { dataset: data, contentId, circuits } = workedExample('half');
  const { result } = estimate({ dataset: data, contentId, gateClass: gateClassById('half-turn-1q/1'), replicates: 50, predict: circuits });
  expect(result.patches[0]!.misfit!.sigmas).toBeGreaterThan(9);
  expect(result.patches[0]!.misfit!.sigmas).toBeLessThan(15);
  expect(result.warnings.some((w) => w.includes('do not fit the first-order model'))).toBe(true);
  for (const p of result.predictions) {
    expect(p.probabilities).not.toBeNull();
    expect(p.intervals).toBeNull();
  }
  for (const f of result.figures.filter((x) => x.determined)) expect([f.key, f.intervals]).toEqual([f.key, null]);
});

test('id, h, t with one length only: rank 30, no gate loss, no error per gate', () => {
  const cliffordT = gateClassById('clifford-t-1q/1')!;
  const { result } = estimate({ dataset: dataset(cliffordT.gates, made(cliffordT, 'one length', { lengths: [8] }), cliffordT.id), contentId: 'one', gateClass: cliffordT, replicates: 20 });
  expect(result.patches[0]!.rank).toBe(30);
  expect(result.patches[0]!.sound).toBe(false);
  for (const key of ['gate-loss', 'error-per-gate']) expect(result.figures.filter((f) => f.key === key).every((f) => f.value === null && f.reason === 'not determined by this gate set')).toBe(true);
});

test('counts that no device of these gates could give: passes are stopped, everything stays finite, a warning says so', () => {
  const g = seeded('nonsense');
  const circuits = drawCircuits(quarter.gates, [2, 4, 8, 16], 200, g).map((c): DatasetCircuit => ({ ...c, shots: 100, counts: g.next() < 0.5 ? { 0: 100 } : { 1: 100 } }));
  const { result } = estimate({ dataset: dataset(quarter.gates, circuits, quarter.id), contentId: 'nonsense', gateClass: quarter, replicates: 40 });
  expect(result.patches[0]!.settled).toBe(false);
  expect(result.warnings.some((w) => w.includes('stopped'))).toBe(true);
  for (const f of result.figures.filter((x) => x.determined)) {
    expect(Number.isFinite(f.value)).toBe(true);
    expect(f.firstOrder).toBeCloseTo(f.value!, 12);
  }
  expect(JSON.stringify(result)).not.toMatch(/NaN|Infinity/);
});

test('too few circuits to hold anything: fewer rows than unknowns is incomplete, and says what is not determined', () => {
  const { result } = estimate({ dataset: dataset(quarter.gates, made(quarter, 'few', { count: 6 }), quarter.id), contentId: 'few', gateClass: quarter, replicates: 10 });
  expect(result.patches[0]!.rank).toBeLessThanOrEqual(6);
  expect(result.patches[0]!.complete).toBe(false);
  expect(result.figures.find((f) => f.key === 'gate-loss')!.value).toBeNull();
});

test('a nearly degenerate set is too weak: nothing of it is determined', () => {
  const gates = one('id', ['rx', 1e-4], ['ry', Math.PI / 2], ['rx', Math.PI / 2 + 1e-4]);
  const g = seeded('weak');
  const set = idealGateSet(gates, [0]);
  const circuits = drawCircuits(gates, [2, 3], 150, g);
  const data = dataset(gates, drawCounts(circuits, slowProbabilities(set, makeNoisy(set, 0, 0, 0.01, g), circuits), 1, 500, g));
  const { result } = estimate({ dataset: data, contentId: 'weak', gateClass: null, replicates: 10 });
  expect(result.patches[0]!.conditionRatio).toBeLessThan(1e-3);
  expect(result.figures.every((f) => f.value === null)).toBe(true);
  expect(result.warnings.some((w) => w.includes('too weak'))).toBe(true);
});

describe('sealed circuits', () => {
  const circuits = made(quarter, 'sealed', { count: 320 });
  const seal = (ids: string[]): Seal => ({ format: 'evenbeam.seal', formatVersion: '1.0.0', runSheet: 'RS-000001', secret: '', sealSha256: '', sealed: ids });
  const data = dataset(quarter.gates, circuits, quarter.id);
  const ids = circuits.slice(0, 64).map((c) => c.id);
  const run = (patch: Partial<Parameters<typeof estimate>[0]>): Result => estimate({ dataset: data, contentId: 'sealed', gateClass: quarter, replicates: 300, ...patch }).result;

  test('they are kept out of the estimate, counted, and predicted as well as noise allows', () => {
    const result = run({ seal: seal(ids) });
    expect(result.sealed).toBe(64);
    const without = estimate({ dataset: { ...data, patches: [{ qubits: [0], circuits: circuits.slice(64) }] }, contentId: 'sealed', gateClass: quarter, replicates: 300 }).result;
    expect(without.sealed).toBe(0);
    const values = (r: Result) => r.figures.filter((f) => f.key !== 'prediction-error').map((f) => f.value);
    expect(values(result)).toEqual(values(without));
    const check = result.sealedCheck!;
    expect(check.passed).toBe(true);
    expect(Math.abs(check.z)).toBeLessThan(2.6);
    expect(check.ideal).toBeGreaterThan(check.value);
    const figure = result.figures.find((f) => f.key === 'prediction-error')!;
    expect(figure.value).toBe(check.value);
    expect(figure.intervals!.every((i) => i.low >= 0 && i.low <= i.high)).toBe(true);
  });

  test('tampered sealed counts do not pass', () => {
    const turned = { ...data, patches: [{ qubits: [0], circuits: circuits.map((c, i) => (i < 20 ? { ...c, counts: { 0: c.counts['1'] ?? 0, 1: c.counts['0'] ?? 0 } } : c)) }] };
    const result = run({ dataset: turned, seal: seal(ids) });
    expect(result.sealedCheck!.passed).toBe(false);
    expect(result.sealedCheck!.z).toBeGreaterThan(5);
  });

  test('without a seal every circuit is used and there is no prediction error', () => {
    const result = run({ replicates: 5 });
    expect([result.sealed, result.sealedCheck]).toEqual([0, null]);
    expect(result.figures.find((f) => f.key === 'prediction-error')!.reason).toBe('no sealed circuits');
  });
});

test('figures come by key, then by depth or gate in declared order; labels of the dataset are free', () => {
  const renamed = quarter.gates.map((g, i) => ({ ...g, label: `gate-${i}` })).reverse();
  const names = new Map(quarter.gates.map((g, i) => [g.label, `gate-${i}`]));
  const circuits = made(quarter, 'order').map((c) => ({ ...c, gates: c.gates.map((l) => names.get(l)!) }));
  const { result } = estimate({ dataset: dataset(renamed, circuits, quarter.id), contentId: 'order', gateClass: quarter, replicates: 5 });
  const depths = [0, 1, 4, 8, 16, 32, 64];
  const gates = ['gate-2', 'gate-1', 'gate-0'];
  expect(result.figures.map((f) => `${f.key} ${f.depth ?? f.gate ?? ''}`.trim())).toEqual([
    ...depths.map((d) => `retained-signal ${d}`), ...depths.map((d) => `output-error ${d}`), 'error-per-gate',
    ...gates.map((g) => `gate-loss ${g}`), ...gates.map((g) => `angle-error ${g}`), 'readout-loss', 'prediction-error',
  ]);
  const plain = estimate({ dataset: dataset(quarter.gates, made(quarter, 'order'), quarter.id), contentId: 'order', gateClass: quarter, replicates: 5 }).result;
  const at16 = (r: Result) => r.figures.find((f) => f.key === 'retained-signal' && f.depth === 16)!.value!;
  expect(at16(result)).toBeCloseTo(at16(plain), 10);
  expect(result.figures.find((f) => f.depth === 64)!.extrapolated).toBe(true);
  expect(result.figures.find((f) => f.depth === 32)!.extrapolated).toBe(false);
});

test('a custom set has no bench circuits but a readout loss', () => {
  const { result } = estimate({ dataset: dataset(quarter.gates, made(quarter, 'custom')), contentId: 'custom', gateClass: null, replicates: 5 });
  expect(result.figures.filter((f) => f.key === 'retained-signal').every((f) => f.reason === 'no bench circuits')).toBe(true);
  expect(result.figures.find((f) => f.key === 'readout-loss')!.value).not.toBeNull();
});

test('a number of replicates that is none is named', () => {
  expect(() => estimate({ dataset: dataset(quarter.gates, made(quarter, 'n')), contentId: 'n', gateClass: null, replicates: 0 })).toThrow('not 0');
});
