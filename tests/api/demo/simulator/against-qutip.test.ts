import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { createSimulator } from '#api/demo/simulator/circuit-simulator.ts';
import type { DeviceModel } from '#api/demo/simulator/device-model.ts';
import { trueGateLoss } from '#api/demo/simulator/truth.ts';
import type { GateDeclaration } from '#shared/formats/types.ts';

interface QutipCase {
  name: string;
  model: DeviceModel;
  gates: GateDeclaration[];
  qubits: number[];
  moment: number;
  circuits: { gates: string[]; probabilities: number[] }[];
  averageGateFidelity?: Record<string, number>;
}

/** Made by tests/reference/qutip/make_noisy.py with QuTiP 4.7.1, seed 20260504. */
const file = JSON.parse(readFileSync(new URL('../../../reference/qutip/noisy.json', import.meta.url), 'utf8')) as { cases: QutipCase[] };

describe.each(file.cases)('the simulator against QuTiP 4.7.1: $name', ({ model, gates, qubits, moment, circuits }) => {
  it('gives every outcome probability to 1e-12, leftmost bit = first qubit listed', () => {
    const simulator = createSimulator(model, gates, qubits, moment);
    for (const { gates: circuit, probabilities } of circuits) {
      const got = simulator.probabilities(circuit);
      expect(got.length).toBe(probabilities.length);
      probabilities.forEach((p, o) => expect(Math.abs(got[o]! - p), circuit.join(' ')).toBeLessThan(1e-12));
    }
  });
});

const withFidelity = file.cases.filter((c) => c.averageGateFidelity);

describe.each(withFidelity)('true gate loss against QuTiP 4.7.1: $name', ({ model, gates, qubits, moment, averageGateFidelity }) => {
  it('belongs to the average fidelity of each gate: F = (d(1 − loss) + 1)/(d + 1), to 1e-12', () => {
    const d = 2 ** qubits.length;
    for (const [label, fidelity] of Object.entries(averageGateFidelity!)) {
      const loss = trueGateLoss(model, gates.find((g) => g.label === label)!, qubits, moment);
      expect(Math.abs((d * (1 - loss) + 1) / (d + 1) - fidelity), label).toBeLessThan(1e-12);
    }
  });
});
