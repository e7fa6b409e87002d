import type { GateDeclaration } from '#shared/formats/types.ts';
import { idealTransferMatrix } from '#shared/quantum/ideal-gate.ts';
import { embedTransferMatrix } from '#shared/quantum/transfer-matrix.ts';
import type { Xoshiro256 } from '#shared/random/xoshiro256.ts';
import { dampingMap, flipMap, pairErrorMap, rotationMap } from '#tests/studies/coverage/error-maps.ts';
import { multiply, normal } from '#tests/shared/method/made.ts';

/** A made device: what every gate, preparation and readout truly does. */
export interface Device {
  /** By label, D×D over the gate's own targets. */
  gates: ReadonlyMap<string, Float64Array>;
  /** Of each qubit: state and the effects of 0 and 1 over I, X, Y, Z (divided by √2). */
  states: readonly Float64Array[];
  effects: readonly (readonly [Float64Array, Float64Array])[];
}

/** Of the infidelity that is not coherent, the share of damping; the rest is flips of X, Y and Z in random parts. */
const DAMPED = 0.3;
/** Of a pair gate's infidelity, the share each of its two qubits has by itself; the rest lies between them. */
const LOCAL_SHARE = 0.2;
/** One-qubit gates of a register with pair gates are that much better than the pair gates. */
const LOCAL_NOISE = 0.2;

/**
 * A device whose worst gate has the entanglement infidelity `noise` (to second order in it), the others between half of it
 * and all. Coherent part: rotations of either sense about axes near the gate's own, with a random lean. Stochastic part: flips
 * and damping; between two qubits ZZ rotation and depolarisation. Preparation error near 0.5 %, readout error near 1 and 2 %.
 */
export function makeDevice(gates: readonly GateDeclaration[], qubits: number, noise: number, coherent: number, generator: Xoshiro256): Device {
  const hasPairs = gates.some((g) => g.targets.length === 2);
  const shares = gates.map(() => 0.5 + 0.5 * generator.next());
  const among = (size: number): number[] => gates.flatMap((g, k) => (g.targets.length === size ? [k] : []));
  for (const size of [1, 2]) {
    const worst = Math.max(...among(size).map((k) => shares[k]!));
    for (const k of among(size)) shares[k]! /= worst;
  }
  const made = new Map<string, Float64Array>();
  gates.forEach((gate, k) => {
    const own = noise * shares[k]!;
    const ideal = idealTransferMatrix(gate.ideal);
    if (gate.targets.length === 1) made.set(gate.label, multiply(oneQubitError('gate' in gate.ideal ? gate.ideal.gate : '', own * (hasPairs ? LOCAL_NOISE : 1), coherent, generator), ideal, 4));
    else made.set(gate.label, multiply(twoQubitError(own, coherent, generator), ideal, 16));
  });
  const near = (value: number): number => value * (0.5 + generator.next());
  const scale = Math.SQRT1_2;
  const states: Float64Array[] = [];
  const effects: [Float64Array, Float64Array][] = [];
  for (let q = 0; q < qubits; q++) {
    states.push(Float64Array.of(scale, 0, 0, scale * (1 - 2 * near(0.005))));
    const zeroAsOne = near(0.01);
    const oneAsZero = near(0.02);
    const zero = Float64Array.of(scale * (1 - zeroAsOne + oneAsZero), 0, 0, scale * (1 - zeroAsOne - oneAsZero));
    effects.push([zero, Float64Array.of(2 * scale - zero[0]!, 0, 0, -zero[3]!)]);
  }
  return { gates: made, states, effects };
}

const AXES: Readonly<Record<string, readonly number[]>> = { rx: [1, 0, 0], x: [1, 0, 0], ry: [0, 1, 0], y: [0, 1, 0], h: [Math.SQRT1_2, 0, Math.SQRT1_2] };

function oneQubitError(gate: string, noise: number, coherent: number, generator: Xoshiro256): Float64Array {
  const own = AXES[gate] ?? [0, 0, 1];
  const leaning = own.map((v) => v + 0.4 * normal(generator));
  const size = Math.hypot(...leaning);
  const sense = generator.next() < 0.5 ? -1 : 1;
  const turn = rotationMap(leaning.map((v) => v / size), sense * 2 * Math.asin(Math.sqrt(coherent * noise)));
  const stochastic = (1 - coherent) * noise;
  const parts = [generator.next(), generator.next(), generator.next()] as const;
  const flips = (1 - DAMPED) * stochastic / (parts[0] + parts[1] + parts[2]);
  const loss = multiply(flipMap([parts[0] * flips, parts[1] * flips, parts[2] * flips]), dampingMap(2 * DAMPED * stochastic), 4);
  return multiply(turn, loss, 4);
}

function twoQubitError(noise: number, coherent: number, generator: Xoshiro256): Float64Array {
  const between = (1 - 2 * LOCAL_SHARE) * noise;
  const sense = generator.next() < 0.5 ? -1 : 1;
  const joint = pairErrorMap(sense * 2 * Math.asin(Math.sqrt(coherent * between)), (16 / 15) * (1 - coherent) * between);
  const local = [0, 1].map((q) => embedTransferMatrix(oneQubitError('z', LOCAL_SHARE * noise, coherent, generator), [q], 2));
  return multiply(joint, multiply(local[0]!, local[1]!, 16), 16);
}
