import { perfectPair, perfectQubit, type DeviceModel } from '#api/demo/simulator/device-model.ts';
import type { Dataset } from '#shared/formats/types.ts';
import { lineGates, linePatches, makeRegister } from '#tests/shared/method/chain/made-register.ts';

/** Circuits of each one-qubit patch and of each pair patch: the floor of the shipped chained classes. */
const LOCAL = 200;
const PAIR = 600;

/** Every qubit and every pair alike, so that cost per qubit can be compared between sizes. */
function evenModel(n: number): DeviceModel {
  const qubits = Array.from({ length: n }, () => ({ ...perfectQubit, angleScale: { x: 0.004, y: -0.003, z: 0 }, detuning: 0.003, flips: { x: 1e-4, y: 0, z: 2e-4 }, damping: 2e-4, preparation: 0.01, readout: { zeroAsOne: 0.01, oneAsZero: 0.02 } }));
  return { qubits, pairs: Array.from({ length: n - 1 }, (_, q) => ({ ...perfectPair(q, q + 1), angle: 0.02, phases: [0.01, -0.005] as [number, number], depolarising: 0.004 })) };
}

/** Counts of a simulated line of n qubits: 200 circuits a qubit, 600 a pair of neighbours, 1,000 shots; always the same. */
export const chainedLine = (n: number): Dataset => makeRegister(`bench line of ${n}`, lineGates(n), linePatches(n, LOCAL, PAIR), 'custom', evenModel(n));
