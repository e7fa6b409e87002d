import type { DatasetCircuit, DatasetPatch, GateDeclaration } from '#shared/formats/types.ts';
import { idealGateSet, indexCircuits } from '#shared/method/gate-set.ts';
import { idealTransferMatrix } from '#shared/quantum/ideal-gate.ts';
import { embedTransferMatrix } from '#shared/quantum/transfer-matrix.ts';
import { outcomeLabels } from '#shared/method/frequencies.ts';
import { binomial } from '#shared/random/binomial.ts';
import type { Xoshiro256 } from '#shared/random/xoshiro256.ts';

/** Strengths of the simulated faults: share of the state lost to noise, radians of over-rotation, share of outcomes misread. */
export interface Faults {
  lost: number;
  turn: number;
  misread: number;
}

const product = (a: Float64Array, b: Float64Array, D: number): Float64Array => {
  const out = new Float64Array(D * D);
  for (let i = 0; i < D; i++) for (let k = 0; k < D; k++) for (let j = 0; j < D; j++) out[i * D + j]! += a[i * D + k]! * b[k * D + j]!;
  return out;
};

const turned = (angle: number, places: readonly number[], n: number): Float64Array => {
  const D = 4 ** n;
  const of = (gate: string, at: readonly number[]): Float64Array => embedTransferMatrix(idealTransferMatrix({ gate, params: [angle] }), at, n);
  const single = places.map((place, i) => of(i % 2 === 0 ? 'rx' : 'rz', [place])).reduce((a, b) => product(a, b, D));
  return places.length > 1 ? product(of('cp', places), single, D) : single;
};

/**
 * A device for the vectors: every gate is followed by a turn that is the same each time and by a loss of signal, a little
 * more with each gate in the list; every qubit is misread alike. Outcome probabilities of one circuit, ascending.
 */
export function probabilities(gates: readonly GateDeclaration[], qubits: readonly number[], circuit: readonly string[], faults: Faults): number[] {
  const set = idealGateSet(gates, qubits);
  const { n, d, D } = set;
  const declared = new Map(gates.map((gate, k) => [gate.label, { gate, k }]));
  const noisy = set.gates.map((ideal, k) => {
    const { gate, k: place } = declared.get(set.labels[k]!)!;
    const weight = 1 + 0.25 * place;
    const out = product(turned(faults.turn * weight, gate.targets.map((t) => qubits.indexOf(t)), n), ideal, D);
    for (let i = D; i < D * D; i++) out[i]! *= 1 - faults.lost * weight * gate.targets.length ** 2;
    return out;
  });
  let state = set.state.slice();
  for (const k of indexCircuits(set, [{ gates: [...circuit] }])[0]!) state = Float64Array.from({ length: D }, (_, i) => state.reduce((sum, x, j) => sum + noisy[k]![i * D + j]! * x, 0));
  const read = set.effects.map((effect) => effect.reduce((sum, x, a) => sum + x * state[a]!, 0));
  return Array.from({ length: d }, (_, o) => read.reduce((sum, p, from) => {
    let chance = p;
    for (let q = 0; q < n; q++) chance *= ((o ^ from) >> q) & 1 ? faults.misread : 1 - faults.misread;
    return sum + chance;
  }, 0));
}

/** Runs circuits on the device. Outcomes that never came are left out of the counts where `sparse` says so, as the format allows. */
export function run(gates: readonly GateDeclaration[], { qubits, circuits }: { qubits: number[]; circuits: { id: string; gates: string[] }[] }, shots: readonly number[], faults: Faults, random: Xoshiro256, sparse = false): DatasetPatch {
  const names = outcomeLabels(qubits.length);
  const taken = circuits.map(({ id, gates: labels }, i): DatasetCircuit => {
    const p = probabilities(gates, qubits, labels, faults);
    const total = shots[i % shots.length]!;
    let left = total;
    let tail = 1;
    const counts = names.map((_, o) => {
      const count = o === names.length - 1 ? left : binomial(random, left, Math.min(1, Math.max(0, p[o]! / tail)));
      left -= count;
      tail -= p[o]!;
      return count;
    });
    return { id, gates: [...labels], shots: total, counts: Object.fromEntries(names.map((name, o) => [name, counts[o]!] as const).filter(([, count]) => !sparse || count > 0)) };
  });
  return { qubits, circuits: taken };
}
