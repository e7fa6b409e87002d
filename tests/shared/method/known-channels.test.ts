/**
 * Known channels recovered from simulated counts. Outside values (recomputed with numpy; the first also with QuTiP):
 * amplitude damping γ = 0.1 has average fidelity 0.9662277660168379; an over-rotation by 0.1 has 1 − F_avg = 1.66527824066e-3
 * and 1 − F_e = sin²(0.05); a rotation generator h = 0.01 with a dephasing generator s = 0.001 about X has
 * 1 − F_e = (1 − e^(−2s) cos 2h)/2 = 1.09879753957e-3. With F_avg = (2F_e + 1)/3, 1 − F_e = 1.5 (1 − F_avg).
 */
import { describe, expect, test } from 'vitest';
import type { Figure } from '#shared/formats/types.ts';
import { estimate } from '#shared/method/estimate.ts';
import { idealGateSet } from '#shared/method/gate-set.ts';
import type { NoisyMaps } from '#shared/method/parameters.ts';
import { dataset, drawCircuits, drawCounts, multiply, one, QUARTER, seeded, slowProbabilities } from '#tests/shared/method/made.ts';

const gates = one('id', ['rx', QUARTER], ['ry', QUARTER]);
const set = idealGateSet(gates, [0]);

/** Transfer matrix of a turn about X by `angle`, its turning plane shrunk to `kept`. */
const aboutX = (angle: number, kept = 1): Float64Array => {
  const [c, s] = [kept * Math.cos(angle), kept * Math.sin(angle)];
  return Float64Array.of(1, 0, 0, 0, 0, 1, 0, 0, 0, 0, c, -s, 0, 0, s, c);
};
const damping = (g: number): Float64Array => Float64Array.of(1, 0, 0, 0, 0, Math.sqrt(1 - g), 0, 0, 0, 0, Math.sqrt(1 - g), 0, g, 0, 0, 1 - g);

/** Perfect gates and SPAM, save that gate k is followed by a channel. */
function withChannel(k: number, channel: Float64Array): NoisyMaps {
  const maps = { gates: Float64Array.from(set.gates.flatMap((g) => Array.from(g))), state: set.state.slice(), effects: set.effects[0]!.slice() };
  maps.gates.set(multiply(channel, set.gates[k]!, 4), 16 * k);
  return maps;
}

/** Estimates of one gate from twenty simulated datasets of 400 circuits and 2,000 shots. */
function estimatesOf(name: string, k: number, channel: Float64Array, lengths: number[], key: Figure['key']): Figure[] {
  return Array.from({ length: 20 }, (_, trial) => {
    const generator = seeded(`${name} ${trial}`);
    const circuits = drawCircuits(gates, lengths, 400, generator);
    const counted = drawCounts(circuits, slowProbabilities(set, withChannel(k, channel), circuits), 1, 2000, generator);
    const { result } = estimate({ dataset: dataset(gates, counted), contentId: `${name} ${trial}`, gateClass: null, replicates: 300 });
    expect(result.patches[0]!.settled).toBe(true);
    return result.figures.find((f) => f.key === key && f.gate === gates[k]!.label)!;
  });
}

const cases: { name: string; k: number; channel: Float64Array; lengths: number[]; key: Figure['key']; truth: number }[] = [
  { name: 'amplitude damping', k: 0, channel: damping(0.1), lengths: [1, 2, 4, 6], key: 'gate-loss', truth: 1.5 * (1 - 0.9662277660168379) },
  { name: 'over-rotation, loss', k: 1, channel: aboutX(0.1), lengths: [1, 2, 4, 6], key: 'gate-loss', truth: 1.5 * 1.66527824066e-3 },
  { name: 'over-rotation, angle', k: 1, channel: aboutX(0.1), lengths: [1, 2, 4, 6], key: 'angle-error', truth: 0.1 },
  { name: 'rotation and dephasing generators, loss', k: 1, channel: aboutX(0.02, Math.exp(-0.002)), lengths: [2, 4, 8, 16], key: 'gate-loss', truth: 1.09879753957e-3 },
  { name: 'rotation and dephasing generators, angle', k: 1, channel: aboutX(0.02, Math.exp(-0.002)), lengths: [2, 4, 8, 16], key: 'angle-error', truth: 0.02 },
];

describe.each(cases)('$name', ({ name, k, channel, lengths, key, truth }) => {
  test('the known value lies in the 95 % interval of at least 17 of 20 datasets, and the mean is within three standard errors of it', () => {
    const found = estimatesOf(name, k, channel, lengths, key);
    const inside = found.filter((f) => { const { low, high } = f.intervals!.find((i) => i.level === 0.95)!; return truth >= low && truth <= high; });
    expect(inside.length).toBeGreaterThanOrEqual(17);
    const mean = found.reduce((s, f) => s + f.value!, 0) / found.length;
    const error = Math.sqrt(found.reduce((s, f) => s + f.standardError! ** 2, 0)) / found.length;
    expect(Math.abs(mean - truth) / error).toBeLessThan(3);
  });
});
