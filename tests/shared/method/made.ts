import { sha256 } from '@noble/hashes/sha2.js';
import { utf8ToBytes } from '@noble/hashes/utils.js';
import type { Dataset, DatasetCircuit, GateDeclaration } from '#shared/formats/types.ts';
import { outcomeLabels } from '#shared/method/frequencies.ts';
import type { GateSet } from '#shared/method/gate-set.ts';
import type { NoisyMaps } from '#shared/method/parameters.ts';
import { MultinomialTable } from '#shared/random/multinomial.ts';
import { Xoshiro256 } from '#shared/random/xoshiro256.ts';

/** Seeded numbers for a test, named by a text. */
export function seeded(text: string): Xoshiro256 {
  return new Xoshiro256(sha256(utf8ToBytes(text)));
}

export function one(...names: (string | [string, number])[]): GateDeclaration[] {
  return names.map((n, i) => (typeof n === 'string' ? { label: `${n}${i}`, targets: [0], ideal: { gate: n } } : { label: `${n[0]}${i}`, targets: [0], ideal: { gate: n[0], params: [n[1]] } }));
}

export const QUARTER = Math.PI / 2;

export function pairGates(entangling: string): GateDeclaration[] {
  const turn = (label: string, target: number, gate: string) => ({ label, targets: [target], ideal: { gate, params: [QUARTER] } });
  return [turn('xa', 0, 'rx'), turn('ya', 0, 'ry'), turn('xb', 1, 'rx'), turn('yb', 1, 'ry'), { label: 'cc', targets: [0, 1], ideal: { gate: entangling } }];
}

/** Circuits with lengths drawn uniformly from a list, then each gate uniformly. */
export function drawCircuits(gates: readonly GateDeclaration[], lengths: readonly number[], count: number, generator: Xoshiro256): { id: string; gates: string[] }[] {
  return Array.from({ length: count }, (_, i) => {
    const length = lengths[Math.floor(generator.next() * lengths.length)]!;
    return { id: `c${i}`, gates: Array.from({ length }, () => gates[Math.floor(generator.next() * gates.length)]!.label) };
  });
}

/** Standard normal deviate by twelve uniforms; good enough to make noise from. */
export function normal(generator: Xoshiro256): number {
  let s = -6;
  for (let i = 0; i < 12; i++) s += generator.next();
  return s;
}

/** Noisy maps: after each gate a random rotation of angle about `coherent` and a shrinking of each Pauli by about `stochastic`. */
export function makeNoisy(set: GateSet, coherent: number, stochastic: number, spam: number, generator: Xoshiro256): NoisyMaps {
  const { D, d } = set;
  const gates = new Float64Array(set.gates.length * D * D);
  set.gates.forEach((g, k) => {
    let after = identity(D);
    const turn = identity(D);
    for (let a = 1; a < D; a++) turn[a * D + a] = 1 - stochastic * (0.5 + generator.next());
    const generatorMatrix = antisymmetric(D, coherent, generator);
    after = multiply(exponential(generatorMatrix, D), turn, D);
    gates.set(multiply(after, g, D), k * D * D);
  });
  const state = set.state.slice();
  for (let a = 1; a < D; a++) state[a]! *= 1 - spam;
  const effects = new Float64Array((d - 1) * D);
  for (let o = 0; o < d - 1; o++) for (let a = 0; a < D; a++) effects[o * D + a] = set.effects[o]![a]! * (a === 0 ? 1 : 1 - 2 * spam);
  return { gates, state, effects };
}

export function identity(n: number): Float64Array {
  const out = new Float64Array(n * n);
  for (let i = 0; i < n; i++) out[i * n + i] = 1;
  return out;
}

export function multiply(a: Float64Array, b: Float64Array, n: number): Float64Array {
  const out = new Float64Array(n * n);
  for (let i = 0; i < n; i++) for (let k = 0; k < n; k++) for (let j = 0; j < n; j++) out[i * n + j]! += a[i * n + k]! * b[k * n + j]!;
  return out;
}

/** A rotation generator on the block without first row and column. */
function antisymmetric(n: number, size: number, generator: Xoshiro256): Float64Array {
  const out = new Float64Array(n * n);
  for (let i = 1; i < n; i++) {
    for (let j = 1; j < i; j++) {
      const v = size * normal(generator);
      out[i * n + j] = v;
      out[j * n + i] = -v;
    }
  }
  return out;
}

/** Matrix exponential by its series; the arguments of these tests are small. */
export function exponential(a: Float64Array, n: number): Float64Array {
  let term: Float64Array = identity(n);
  const out = identity(n);
  for (let k = 1; k < 30; k++) {
    term = multiply(term, a, n).map((v) => v / k);
    for (let i = 0; i < out.length; i++) out[i]! += term[i]!;
  }
  return out;
}

/** Slow oracle: the product of maps, one circuit and one gate at a time. circuits × d. */
export function slowProbabilities(set: GateSet, maps: NoisyMaps, circuits: readonly { gates: readonly string[] }[]): Float64Array {
  const { D, d } = set;
  const out = new Float64Array(circuits.length * d);
  circuits.forEach((c, i) => {
    let v = Array.from(maps.state);
    for (const label of c.gates) {
      const at = set.labels.indexOf(label) * D * D;
      v = v.map((_, r) => v.reduce((s, x, j) => s + maps.gates[at + r * D + j]! * x, 0));
    }
    let rest = 1;
    for (let o = 0; o < d - 1; o++) {
      const p = v.reduce((s, x, j) => s + maps.effects[o * D + j]! * x, 0);
      out[i * d + o] = p;
      rest -= p;
    }
    out[i * d + d - 1] = rest;
  });
  return out;
}

/** Counts drawn from probabilities (clipped to [0, 1]). */
export function drawCounts(circuits: readonly { id: string; gates: string[] }[], probabilities: Float64Array, n: number, shots: number, generator: Xoshiro256): DatasetCircuit[] {
  const labels = outcomeLabels(n);
  const d = labels.length;
  const clipped = probabilities.map((p) => Math.min(1, Math.max(0, p)));
  const rows = new Float64Array(circuits.length * (d - 1));
  new MultinomialTable(clipped, new Float64Array(circuits.length).fill(shots), d).draw(generator, rows, 0, 1);
  return circuits.map((c, i) => {
    const counts: Record<string, number> = {};
    let left = shots;
    labels.forEach((label, o) => {
      const k = o === d - 1 ? left : Math.round(rows[i * (d - 1) + o]! * shots);
      left -= k;
      if (k > 0) counts[label] = k;
    });
    return { ...c, shots, counts };
  });
}

export function dataset(gates: GateDeclaration[], circuits: DatasetCircuit[], gateClass = 'custom'): Dataset {
  const size = 1 + Math.max(...gates.flatMap((g) => g.targets));
  const register = Array.from({ length: size }, (_, q) => `q${q}`);
  return {
    format: 'evenbeam.dataset', formatVersion: '1.0.0', title: 'made for a test', gateClass, device: { provider: 'Pellmere Instruments', name: 'Reed-1', modality: 'simulated' },
    register, gates, patches: [{ qubits: register.map((_, q) => q), circuits }], acquisition: { startedAt: '2026-01-01T00:00:00Z', endedAt: '2026-01-01T01:00:00Z', software: 'test' },
    contributors: [{ name: 'A. Example' }], licence: 'CC-BY-4.0',
  };
}
