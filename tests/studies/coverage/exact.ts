import type { GateDeclaration } from '#shared/formats/types.ts';
import type { NoisyMaps } from '#shared/method/parameters.ts';
import { embedTransferMatrix } from '#shared/quantum/transfer-matrix.ts';
import type { Device } from '#tests/studies/coverage/device.ts';

/** A device seen on some of its qubits: maps in the form the figures are read from, and the effects of all outcomes. */
export interface Exact {
  maps: NoisyMaps;
  labels: string[];
  allEffects: Float64Array[];
  D: number;
  d: number;
}

const kron = (a: Float64Array, b: Float64Array): Float64Array => Float64Array.from({ length: a.length * b.length }, (_, i) => a[Math.floor(i / b.length)]! * b[i % b.length]!);

/** The declared gates inside `qubits`, in declared order; outcomes ascending as bit strings. */
export function exactOn(device: Device, declared: readonly GateDeclaration[], qubits: readonly number[]): Exact {
  const n = qubits.length;
  const d = 2 ** n;
  const D = d * d;
  const inside = declared.filter((g) => g.targets.every((t) => qubits.includes(t)));
  const gates = new Float64Array(inside.length * D * D);
  inside.forEach((g, k) => gates.set(embedTransferMatrix(device.gates.get(g.label)!, g.targets.map((t) => qubits.indexOf(t)), n), k * D * D));
  const state = qubits.map((q) => device.states[q]!).reduce(kron);
  const allEffects = Array.from({ length: d }, (_, o) => qubits.map((q, k) => device.effects[q]![((o >> (n - 1 - k)) & 1) as 0 | 1]).reduce(kron));
  const effects = new Float64Array((d - 1) * D);
  for (let o = 0; o < d - 1; o++) effects.set(allEffects[o]!, o * D);
  return { maps: { gates, state, effects }, labels: inside.map((g) => g.label), allEffects, D, d };
}

/** Outcome probabilities gate by gate, one circuit after another: shares no code with the method's evaluator. circuits × d. */
export function exactProbabilities({ maps, labels, allEffects, D, d }: Exact, circuits: readonly (readonly string[])[]): Float64Array {
  const out = new Float64Array(circuits.length * d);
  const place = new Map(labels.map((label, k) => [label, k * D * D]));
  let v = new Float64Array(D);
  let w = new Float64Array(D);
  circuits.forEach((gates, c) => {
    v.set(maps.state);
    for (const label of gates) {
      const at = place.get(label)!;
      for (let i = 0; i < D; i++) {
        let sum = 0;
        for (let j = 0; j < D; j++) sum += maps.gates[at + i * D + j]! * v[j]!;
        w[i] = sum;
      }
      [v, w] = [w, v];
    }
    allEffects.forEach((m, o) => {
      let p = 0;
      for (let a = 0; a < D; a++) p += m[a]! * v[a]!;
      out[c * d + o] = p;
    });
  });
  return out;
}
