import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { createSimulator } from '#api/demo/simulator/circuit-simulator.ts';
import { perfectPair, perfectQubit } from '#api/demo/simulator/device-model.ts';
import type { GateDeclaration } from '#shared/formats/types.ts';

interface IdealCircuit {
  qubits: number;
  gates: { gate: string; params?: number[]; targets: number[] }[];
  probabilities: number[];
}

/** Made by tests/reference/probabilities/make-ideal.mjs with quantum-circuit 0.9.250, which rounds amplitudes to 14 digits. */
const file = JSON.parse(readFileSync(new URL('../../../reference/probabilities/ideal.json', import.meta.url), 'utf8')) as { circuits: IdealCircuit[] };

describe('a device without errors', () => {
  it.each([1, 2, 3])('gives the ideal probabilities of the npm package quantum-circuit on %i qubits to 1e-12', (n) => {
    const circuits = file.circuits.filter((c) => c.qubits === n);
    expect(circuits).toHaveLength(24);
    const all = Array.from({ length: n }, (_, q) => q);
    const model = { qubits: all.map(() => perfectQubit), pairs: all.flatMap((a) => all.filter((b) => b > a).map((b) => perfectPair(a, b))) };
    for (const circuit of circuits) {
      const gates = circuit.gates.map(({ gate, params, targets }, i): GateDeclaration => ({ label: `g${i}`, targets, ideal: params ? { gate, params } : { gate } }));
      const got = createSimulator(model, gates, all).probabilities(gates.map((g) => g.label));
      circuit.probabilities.forEach((p, o) => expect(Math.abs(got[o]! - p), JSON.stringify(circuit.gates)).toBeLessThan(1e-12));
    }
  });

  it('is never asked for more than five qubits', () => {
    const six = Array.from({ length: 6 }, (_, q) => q);
    expect(() => createSimulator({ qubits: six.map(() => perfectQubit), pairs: [] }, [], six)).toThrow('at most 5 qubits, not 6');
  });
});
