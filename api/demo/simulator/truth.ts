import { kron, multiply, trace, zeros, type Matrix } from '#api/demo/simulator/complex-matrix.ts';
import { createSimulator } from '#api/demo/simulator/circuit-simulator.ts';
import { applyKraus, makeSpace, place } from '#api/demo/simulator/density-state.ts';
import { perfectPair, perfectQubit, type DeviceModel } from '#api/demo/simulator/device-model.ts';
import { gateSteps } from '#api/demo/simulator/gate-steps.ts';
import { paulis } from '#api/demo/simulator/standard-unitaries.ts';
import type { GateDeclaration, PlainCircuit } from '#shared/formats/types.ts';

/** The same register without any error. */
export function perfectDevice(model: DeviceModel): DeviceModel {
  return { qubits: model.qubits.map(() => perfectQubit), pairs: model.pairs.map((p) => perfectPair(...p.qubits)) };
}

/**
 * Real transfer matrix R_ab = tr(P_a Λ(P_b))/d of what the device does when asked for a gate, D × D row-major, D = 4ⁿ,
 * Paulis I, X, Y, Z per qubit, first of `qubits` slowest. A third level starts empty and is left out of the traces,
 * so leakage shows as a first row below 1.
 */
export function trueTransferMatrix(model: DeviceModel, gate: GateDeclaration, qubits: readonly number[], moment = 0): Float64Array {
  const levels = qubits.map((q) => (model.qubits[q]?.leakage ? 3 : 2));
  const space = makeSpace(levels);
  const steps = gateSteps(model, gate, qubits, moment).map((s) => ({ at: place(space, s.targets), operators: s.operators }));
  const basis = qubits.reduce<Matrix[]>((all, _, i) => all.flatMap((a) => paulis.map((p) => kron(a, pad(p, levels[i]!)))), [unit()]);
  const out = new Float64Array(basis.length ** 2);
  basis.forEach((b, column) => {
    const rho: Matrix = { ...b, re: b.re.slice(), im: b.im.slice() };
    for (const { at, operators } of steps) applyKraus(rho, at, operators);
    basis.forEach((a, row) => {
      out[row * basis.length + column] = trace(multiply(a, rho))[0] / 2 ** qubits.length;
    });
  });
  return out;
}

/** Entanglement infidelity of the noisy gate on the qubit levels: 1 − tr(R_idealᵀ R)/D. */
export function trueGateLoss(model: DeviceModel, gate: GateDeclaration, qubits: readonly number[] = gate.targets, moment = 0): number {
  const noisy = trueTransferMatrix(model, gate, qubits, moment);
  const ideal = trueTransferMatrix(perfectDevice(model), gate, qubits);
  const overlap = noisy.reduce((sum, x, i) => sum + x * ideal[i]!, 0);
  return 1 - overlap / 4 ** qubits.length;
}

/** Retained signal over circuits: Σ(p − 1/d)(q − 1/d)/Σ(p − 1/d)², p ideal and q true, over circuits and outcomes. */
export function trueRetainedSignal(model: DeviceModel, gates: readonly GateDeclaration[], circuits: readonly PlainCircuit[], moment = 0): number {
  let [upper, lower] = [0, 0];
  for (const circuit of circuits) {
    const q = createSimulator(model, gates, circuit.qubits, moment).probabilities(circuit.gates);
    const p = createSimulator(perfectDevice(model), gates, circuit.qubits).probabilities(circuit.gates);
    p.forEach((x, o) => {
      upper += (x - 1 / p.length) * (q[o]! - 1 / p.length);
      lower += (x - 1 / p.length) ** 2;
    });
  }
  return upper / lower;
}

function unit(): Matrix {
  const one = zeros(1);
  one.re[0] = 1;
  return one;
}

/** A qubit operator on a system with a third level, nothing there. */
function pad(p: Matrix, levels: number): Matrix {
  if (levels === 2) return p;
  const out = zeros(levels);
  for (let i = 0; i < 4; i += 1) {
    out.re[(i >> 1) * levels + (i & 1)] = p.re[i]!;
    out.im[(i >> 1) * levels + (i & 1)] = p.im[i]!;
  }
  return out;
}
