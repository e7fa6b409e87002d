/** Outside reference: ideal outcome probabilities of npm quantum-circuit, an independent state-vector simulator. */
import QuantumCircuit from 'quantum-circuit';
import { expect, test } from 'vitest';
import type { GateDeclaration } from '#shared/formats/types.ts';
import { idealGateSet, indexCircuits } from '#shared/method/gate-set.ts';
import { idealProbabilities } from '#shared/method/readings.ts';
import { seeded } from '#tests/shared/method/made.ts';

const gates: GateDeclaration[] = [
  { label: 'h0', targets: [0], ideal: { gate: 'h' } }, { label: 'h1', targets: [1], ideal: { gate: 'h' } },
  { label: 't0', targets: [0], ideal: { gate: 't' } }, { label: 'sdg1', targets: [1], ideal: { gate: 'sdg' } },
  { label: 'rx0', targets: [0], ideal: { gate: 'rx', params: [0.7] } }, { label: 'ry1', targets: [1], ideal: { gate: 'ry', params: [-1.3] } }, { label: 'rz0', targets: [0], ideal: { gate: 'rz', params: [0.4] } },
  { label: 'cx', targets: [0, 1], ideal: { gate: 'cx' } }, { label: 'xc', targets: [1, 0], ideal: { gate: 'cx' } }, { label: 'cz', targets: [0, 1], ideal: { gate: 'cz' } },
  { label: 'crx', targets: [1, 0], ideal: { gate: 'crx', params: [0.9] } }, { label: 'swap', targets: [0, 1], ideal: { gate: 'swap' } }, { label: 'ch', targets: [0, 1], ideal: { gate: 'ch' } },
];

function simulate(labels: string[]): number[] {
  const circuit = new QuantumCircuit(2);
  labels.forEach((label, column) => {
    const { targets, ideal } = gates.find((g) => g.label === label)!;
    if (!('gate' in ideal)) throw new Error('a named gate is wanted here');
    const theta = ideal.params?.[0];
    circuit.addGate(ideal.gate, column, targets.length === 1 ? targets[0]! : targets, theta === undefined ? undefined : { params: ideal.gate === 'rz' ? { phi: theta } : { theta } });
  });
  circuit.run();
  // Their outcome index counts the first wire as the least significant bit.
  const p = circuit.stateAsArray(false).map(({ amplitude }) => amplitude.re ** 2 + amplitude.im ** 2);
  return [p[0]!, p[2]!, p[1]!, p[3]!];
}

test('outcome probabilities of random two-qubit circuits agree with quantum-circuit to 1e-12, leftmost bit = first qubit', () => {
  const set = idealGateSet(gates, [0, 1]);
  const g = seeded('quantum-circuit');
  const circuits = Array.from({ length: 40 }, (_, i) => ({ gates: Array.from({ length: 1 + (i % 12) }, () => gates[Math.floor(g.next() * gates.length)]!.label) }));
  const found = idealProbabilities(set, indexCircuits(set, circuits));
  circuits.forEach((c, i) => simulate(c.gates).forEach((p, o) => expect(Math.abs(found[4 * i + o]! - p), c.gates.join(' ')).toBeLessThan(1e-12)));
});
