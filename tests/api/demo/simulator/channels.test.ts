import { describe, expect, it } from 'vitest';
import { adjoint, multiply, zeros } from '#api/demo/simulator/complex-matrix.ts';
import { perfectPair, perfectQubit, type DeviceModel } from '#api/demo/simulator/device-model.ts';
import { gateSteps } from '#api/demo/simulator/gate-steps.ts';
import { axisAndAngle } from '#api/demo/simulator/noisy-turn.ts';
import { idealUnitary } from '#api/demo/simulator/standard-unitaries.ts';
import { trueGateLoss, trueTransferMatrix } from '#api/demo/simulator/truth.ts';
import { AppError } from '#shared/errors/app-error.ts';
import type { GateDeclaration } from '#shared/formats/types.ts';

const one = (gate: string, params?: number[]): GateDeclaration => ({ label: gate, targets: [0], ideal: params ? { gate, params } : { gate } });
const cz: GateDeclaration = { label: 'cz', targets: [0, 1], ideal: { gate: 'cz' } };
const device = (...qubits: Partial<typeof perfectQubit>[]): DeviceModel => ({ qubits: qubits.map((q) => ({ ...perfectQubit, ...q })), pairs: qubits.length > 1 ? [perfectPair(0, 1)] : [] });
const noisy = { tilt: 0.03, detuning: 0.02, flips: { x: 0.01, y: 0.02, z: 0.03 }, damping: 0.05, leakage: { out: 0.02, back: 0.01 } };

describe('gate maps', () => {
  it.each([[one('h'), device(noisy)], [cz, { ...device(noisy, { damping: 0.1 }), pairs: [{ ...perfectPair(0, 1), angle: 0.1, depolarising: 0.05, duration: 2 }] }]])('have Kraus operators whose K†K sum to the identity, third level included', (gate, model) => {
    for (const { operators } of gateSteps(model, gate, gate.targets, 0)) {
      const sum = zeros(operators[0]!.rows);
      for (const k of operators) {
        const square = multiply(adjoint(k), k);
        square.re.forEach((x, i) => { sum.re[i] = sum.re[i]! + x; });
        square.im.forEach((x, i) => { sum.im[i] = sum.im[i]! + x; });
      }
      sum.re.forEach((x, i) => expect(x).toBeCloseTo(i % (sum.rows + 1) === 0 ? 1 : 0, 14));
      sum.im.forEach((x) => expect(x).toBeCloseTo(0, 14));
    }
  });

  it('of a perfect device are the ideal ones: rx(π/2) takes Y to Z and Z to −Y (recomputed with numpy 2.4)', () => {
    const expected = [1, 0, 0, 0, 0, 1, 0, 0, 0, 0, 0, -1, 0, 0, 1, 0];
    trueTransferMatrix(device({}), one('rx', [Math.PI / 2]), [0]).forEach((x, i) => expect(x).toBeCloseTo(expected[i]!, 14));
  });

  it('lose trace from the qubit levels by half the leakage: |1⟩ holds half of the fully mixed state', () => {
    const first = trueTransferMatrix(device({ leakage: { out: 0.02, back: 0 } }), one('id'), [0])[0]!;
    expect(first).toBeCloseTo(1 - 0.01, 14);
  });

  it('give an over-rotation by δ the loss sin²(δ/2)', () => {
    const delta = 0.1;
    const model = device({ angleScale: { x: delta / (Math.PI / 2), y: 0, z: 0 } });
    expect(trueGateLoss(model, one('rx', [Math.PI / 2]))).toBeCloseTo(Math.sin(delta / 2) ** 2, 14);
    expect(trueGateLoss(model, one('ry', [Math.PI / 2]))).toBeCloseTo(0, 14);
  });
});

describe('axisAndAngle', () => {
  it.each([['x', [1, 0, 0], Math.PI], ['h', [Math.SQRT1_2, 0, Math.SQRT1_2], Math.PI], ['t', [0, 0, 1], Math.PI / 4], ['sdg', [0, 0, -1], Math.PI / 2], ['sx', [1, 0, 0], Math.PI / 2]] as const)('reads the turn of %s whatever its global phase', (name, axis, angle) => {
    const found = axisAndAngle(idealUnitary({ gate: name }))!;
    axis.forEach((x, i) => expect(found.axis[i]).toBeCloseTo(x, 14));
    expect(found.angle).toBeCloseTo(angle, 14);
  });

  it('finds no axis for the identity', () => expect(axisAndAngle(idealUnitary({ gate: 'id' }))).toBeNull());
});

describe('what the simulator refuses', () => {
  it('a gate that it does not know, by name', () => expect(() => idealUnitary({ gate: 'swirl' })).toThrow(new AppError('invalid-request', 'The simulator has no gate named “swirl”.')));
  it('a wrong number of angles', () => expect(() => idealUnitary({ gate: 'rx' })).toThrow('Gate “rx” takes 1 angles, not 0.'));
  it('an entangling gate between qubits that are not coupled', () => expect(() => gateSteps({ ...device({}, {}), pairs: [] }, cz, [0, 1], 0)).toThrow('no coupling for gate “cz” on register positions 0, 1'));
});
