import { expect, test } from 'vitest';
import { luFactor } from '#shared/linalg/lu.ts';
import { ErrorPerGate } from '#shared/method/error-per-gate.ts';
import { GateLoss } from '#shared/method/gate-loss.ts';
import { idealGateSet, indexCircuits } from '#shared/method/gate-set.ts';
import type { NoisyMaps } from '#shared/method/parameters.ts';
import { probabilitiesOf } from '#shared/method/readings.ts';
import { drawCircuits, makeNoisy, multiply, one, pairGates, QUARTER, seeded } from '#tests/shared/method/made.ts';

function inverted(s: Float64Array, n: number): Float64Array {
  const lu = luFactor(s.slice(), n);
  const out = new Float64Array(n * n);
  for (let j = 0; j < n; j++) {
    const column = new Float64Array(n);
    column[j] = 1;
    lu.solve(column);
    for (let i = 0; i < n; i++) out[i * n + j] = column[i]!;
  }
  return out;
}

/** G → SGS⁻¹, ρ → Sρ, M → S⁻ᵀM. */
function changeGauge(maps: NoisyMaps, s: Float64Array, D: number, gates: number, outcomes: number): NoisyMaps {
  const back = inverted(s, D);
  const out = { gates: new Float64Array(maps.gates.length), state: new Float64Array(D), effects: new Float64Array(outcomes * D) };
  for (let k = 0; k < gates; k++) out.gates.set(multiply(multiply(s, maps.gates.slice(k * D * D, (k + 1) * D * D), D), back, D), k * D * D);
  for (let i = 0; i < D; i++) for (let j = 0; j < D; j++) out.state[i]! += s[i * D + j]! * maps.state[j]!;
  for (let o = 0; o < outcomes; o++) for (let i = 0; i < D; i++) for (let j = 0; j < D; j++) out.effects[o * D + j]! += maps.effects[o * D + i]! * back[i * D + j]!;
  return out;
}

test.each([['quarter turns', one('id', ['rx', QUARTER], ['ry', QUARTER]), [0]], ['h and t', one('id', 'h', 't'), [0]], ['a pair', pairGates('cz'), [0, 1]]] as const)(
  '%s: probabilities, gate loss, angle error and error per gate are the same in every gauge to 1e-12', (name, declared, qubits) => {
    const set = idealGateSet(declared, qubits);
    const { D, d } = set;
    const g = seeded(`gauge ${name}`);
    const circuits = indexCircuits(set, drawCircuits(declared, [0, 1, 4, 16], 30, g));
    for (let trial = 0; trial < 5; trial++) {
      const maps = makeNoisy(set, 0.02, 0.01, 0.02, g);
      const s = new Float64Array(D * D);
      for (let i = 0; i < D * D; i++) s[i] = (i % (D + 1) === 0 ? 1 : 0) + (i < D ? 0 : (0.2 / D) * (g.next() - 0.5));
      const other = changeGauge(maps, s, D, set.gates.length, d - 1);
      const [p, q] = [probabilitiesOf(set, circuits, maps), probabilitiesOf(set, circuits, other)];
      p.forEach((v, i) => expect(Math.abs(v - q[i]!)).toBeLessThan(1e-12));
      set.gates.forEach((ideal, k) => {
        const meter = new GateLoss(ideal, D);
        meter.measure(maps.gates, k * D * D);
        const { loss, angle } = meter;
        meter.measure(other.gates, k * D * D);
        expect(Math.abs(meter.loss - loss)).toBeLessThan(1e-12);
        if (meter.turns) expect(Math.abs(meter.angle - angle)).toBeLessThan(1e-12);
      });
      const meter = new ErrorPerGate(set);
      const [first, second, fresh] = [meter.measure(maps.gates), meter.measure(other.gates), new ErrorPerGate(set).measure(other.gates)];
      expect(Math.abs(first - second)).toBeLessThan(1e-12);
      expect(Math.abs(first - fresh)).toBeLessThan(1e-12);
    }
  },
);
