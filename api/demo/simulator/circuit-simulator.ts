import { zeros, type Matrix } from '#api/demo/simulator/complex-matrix.ts';
import { applyKraus, makeSpace, place, type Placement, type Space } from '#api/demo/simulator/density-state.ts';
import type { DeviceModel } from '#api/demo/simulator/device-model.ts';
import { gateSteps, levelsOf } from '#api/demo/simulator/gate-steps.ts';
import { AppError } from '#shared/errors/app-error.ts';
import type { GateDeclaration } from '#shared/formats/types.ts';

/** Outcome probabilities of circuits on some qubits of a device at one moment of a run. */
export interface CircuitSimulator {
  /** Labels in order of time → probability of each bit string, ascending, leftmost bit = first of `qubits`. */
  probabilities(gates: readonly string[]): Float64Array;
}

/** Most qubits of one circuit: 32 × 32 density matrices. */
const mostQubits = 5;

/**
 * Density-matrix simulation by Kraus operators. `qubits`: register positions, in the order of the bit strings.
 * `moment` −1 (start of the run) … 1 (end) drives the drift. Other qubits of the device rest in |0⟩.
 */
export function createSimulator(model: DeviceModel, gates: readonly GateDeclaration[], qubits: readonly number[], moment = 0): CircuitSimulator {
  if (qubits.length > mostQubits) throw new AppError('invalid-request', `The simulator takes at most ${mostQubits} qubits, not ${qubits.length}.`);
  const missing = qubits.find((q) => !model.qubits[q]);
  if (missing !== undefined) throw new AppError('invalid-request', `The device model has no qubit at register position ${missing}.`);
  const space = makeSpace(levelsOf(model, qubits));
  const made = new Map<string, { at: Placement; operators: Matrix[] }[]>();
  const maps = (label: string): { at: Placement; operators: Matrix[] }[] => {
    let found = made.get(label);
    if (!found) {
      const gate = gates.find((g) => g.label === label && g.targets.every((t) => qubits.includes(t)));
      if (!gate) throw new AppError('invalid-request', `No gate “${label}” is declared on register positions ${qubits.join(', ')}.`);
      found = gateSteps(model, gate, qubits, moment).map((s) => ({ at: place(space, s.targets), operators: s.operators }));
      made.set(label, found);
    }
    return found;
  };
  return {
    probabilities(circuit) {
      const rho = initialState(model, qubits, space);
      for (const label of circuit) for (const { at, operators } of maps(label)) applyKraus(rho, at, operators);
      return readOut(model, qubits, space, rho);
    },
  };
}

function initialState(model: DeviceModel, qubits: readonly number[], space: Space): Matrix {
  const rho = zeros(space.size);
  for (let i = 0; i < space.size; i += 1) {
    rho.re[i * space.size + i] = qubits.reduce((p, q, k) => p * [1 - model.qubits[q]!.preparation, model.qubits[q]!.preparation, 0][level(space, i, k)]!, 1);
  }
  return rho;
}

function level(space: Space, index: number, system: number): number {
  return Math.floor(index / space.strides[system]!) % space.levels[system]!;
}

/** Populations through each qubit's readout error; a third level is reported as |1⟩ would be. */
function readOut(model: DeviceModel, qubits: readonly number[], space: Space, rho: Matrix): Float64Array {
  const out = new Float64Array(2 ** qubits.length);
  for (let i = 0; i < space.size; i += 1) {
    const population = rho.re[i * space.size + i]!;
    for (let o = 0; o < out.length; o += 1) {
      let p = population;
      qubits.forEach((q, k) => {
        const { zeroAsOne, oneAsZero } = model.qubits[q]!.readout;
        const one = level(space, i, k) === 0 ? zeroAsOne : 1 - oneAsZero;
        p *= (o >> (qubits.length - 1 - k)) & 1 ? one : 1 - one;
      });
      out[o] = out[o]! + p;
    }
  }
  return out;
}
