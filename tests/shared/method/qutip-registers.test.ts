import { readFileSync } from 'node:fs';
import { gunzipSync } from 'node:zlib';
import { describe, expect, test } from 'vitest';
import type { Figure } from '#shared/formats/types.ts';
import { estimate } from '#shared/method/estimate.ts';
import { outcomeLabels } from '#shared/method/frequencies.ts';
import { inputOf, type IndependentFixture } from '#tests/shared/method/independent-fixture.ts';

interface QutipTruth {
  gates: Record<string, { gateLoss: number; averageFidelity: number }>;
  probabilities: Record<string, number[]>;
  retainedSignal?: Record<string, number>;
}

/** Made by tests/reference/qutip/make_registers.py with QuTiP 4.7.1, seed 20261203: counts and truth of noisy devices. */
const load = (name: string): IndependentFixture & { truth: QutipTruth } =>
  JSON.parse(gunzipSync(readFileSync(new URL(`../../reference/qutip/${name}.json.gz`, import.meta.url))).toString('utf8')) as IndependentFixture & { truth: QutipTruth };

describe.each([['a joint pair', 'pair', 2], ['a line of three', 'line', 3]] as const)('%s simulated by QuTiP 4.7.1', (title, name, qubits) => {
  const { truth, ...fixture } = load(name);
  const { result } = estimate(inputOf(fixture as IndependentFixture, 300));
  const inside = (f: Figure, value: number): boolean => { const { low, high } = f.intervals!.find((i) => i.level === 0.95)!; return value >= low && value <= high; };

  test(`${title}: sound and settled, and its counts fit`, () => {
    expect(result.patches.every((p) => p.sound && p.settled)).toBe(true);
    for (const p of result.patches) expect(Math.abs(p.misfit!.sigmas)).toBeLessThan(3.3);
  });

  test('every true gate loss within four standard errors, and most within the 95 % interval', () => {
    const losses = result.figures.filter((f) => f.key === 'gate-loss');
    expect(losses.map((f) => f.gate).sort()).toEqual(Object.keys(truth.gates).sort());
    for (const f of losses) expect(Math.abs(f.value! - truth.gates[f.gate!]!.gateLoss) / f.standardError!, f.gate!).toBeLessThan(4);
    expect(losses.filter((f) => inside(f, truth.gates[f.gate!]!.gateLoss)).length / losses.length).toBeGreaterThanOrEqual(0.8);
  });

  test('the true loss equals the entanglement infidelity of QuTiP’s average fidelity up to second order in the error', () => {
    const d = (gate: string): number => 2 ** fixture.dataset.gates.find((g) => g.label === gate)!.targets.length;
    for (const [gate, { gateLoss, averageFidelity }] of Object.entries(truth.gates)) {
      const infidelity = ((d(gate) + 1) / d(gate)) * (1 - averageFidelity);
      expect(Math.abs(gateLoss - infidelity), gate).toBeLessThan(0.06 * infidelity);
    }
  });

  test('95 % intervals of 24 unseen circuits of lengths 2 to 24 hold the truth in 88 to 100 % of outcomes', () => {
    const held = result.predictions.flatMap(({ id, intervals }) => outcomeLabels(qubits).map((label, o) => {
      const [low, high] = intervals![label]!;
      return truth.probabilities[id]![o]! >= low && truth.probabilities[id]![o]! <= high;
    }));
    expect(held).toHaveLength(24 * 2 ** qubits);
    expect(held.filter(Boolean).length / held.length).toBeGreaterThan(0.88);
  });

  test.skipIf(!truth.retainedSignal)('the true retained signal at every depth within four standard errors', () => {
    const signals = result.figures.filter((f) => f.key === 'retained-signal');
    expect(signals.length).toBe(Object.keys(truth.retainedSignal!).length);
    for (const f of signals) expect(Math.abs(f.value! - truth.retainedSignal![String(f.depth)]!) / f.standardError!, `depth ${f.depth}`).toBeLessThan(4);
  });
});
