import { gateClassById } from '#shared/domain/gate-classes.ts';
import type { Dataset, DatasetCircuit, GateClass, Seal } from '#shared/formats/types.ts';
import { outcomeLabels } from '#shared/method/frequencies.ts';
import { GateLoss } from '#shared/method/gate-loss.ts';
import { idealGateSet, type GateSet } from '#shared/method/gate-set.ts';
import type { NoisyMaps } from '#shared/method/parameters.ts';
import { patchCases, type PatchCase } from '#shared/opinions/patch-case.ts';
import { dataset, drawCircuits, drawCounts, makeNoisy, seeded, slowProbabilities } from '../method/made.ts';

export const shipped = (id: string): GateClass => {
  const found = gateClassById(id);
  if (!found) throw new Error(`${id} is shipped`);
  return found;
};

/** Shots so many that the frequencies are the probabilities to nine digits. */
const EXACT = 1e9;

/** Counts that are the probabilities themselves, to 1e-9. */
export function exactCounts(circuits: readonly { id: string; gates: string[] }[], probabilities: Float64Array, n: number): DatasetCircuit[] {
  const labels = outcomeLabels(n);
  return circuits.map((c, i) => {
    let left = EXACT;
    const counts = Object.fromEntries(labels.map((label, o) => {
      const k = o === labels.length - 1 ? left : Math.round(probabilities[i * labels.length + o]! * EXACT);
      left -= k;
      return [label, k];
    }));
    return { ...c, shots: EXACT, counts };
  });
}

export interface Made {
  gateClass: GateClass;
  set: GateSet;
  truth: NoisyMaps;
  data: Dataset;
  seal: Seal | null;
  patch: PatchCase;
}

export interface MadeOptions {
  gateClass?: string;
  noise: number;
  /** Size of the random rotations; the root of the noise unless told, so that half of the loss or so is coherent. */
  coherent?: number;
  spam: number;
  /** Absent: the probabilities themselves. */
  shots?: number;
  circuits?: { id: string; gates: string[] }[];
  count?: number;
  sealed?: number;
  seed: string;
}

/** A dataset of a class whose truth is known. */
export function makeCase({ gateClass: id = 'quarter-turn-1q/1', noise, coherent = Math.sqrt(noise), spam, shots, circuits, count = 240, sealed = 0, seed }: MadeOptions): Made {
  const gateClass = shipped(id);
  const generator = seeded(seed);
  const set = idealGateSet(gateClass.gates, Array.from({ length: gateClass.registerSize }, (_, q) => q));
  const truth = makeNoisy(set, coherent, noise, spam, generator);
  const drawn = circuits ?? drawCircuits(gateClass.gates, gateClass.lengths, count, generator);
  const p = slowProbabilities(set, truth, drawn);
  const counted = shots === undefined ? exactCounts(drawn, p, set.n) : drawCounts(drawn, p, set.n, shots, generator);
  const data = dataset(gateClass.gates, counted, gateClass.id);
  const seal: Seal | null = sealed === 0 ? null : { format: 'evenbeam.seal', formatVersion: '1.0.0', runSheet: 'RS-000001', secret: '00'.repeat(32), sealSha256: '00'.repeat(32), sealed: drawn.slice(0, sealed).map((c) => c.id) };
  const [patch] = patchCases({ dataset: data, gateClass, seal, official: [] });
  return { gateClass, set, truth, data, seal, patch: patch! };
}

/** Gate loss of every gate of some maps. */
export function lossesOf(set: GateSet, maps: NoisyMaps): number[] {
  return set.gates.map((g, k) => {
    const meter = new GateLoss(g, set.D);
    meter.measure(maps.gates, k * set.D * set.D);
    return meter.loss;
  });
}

/** Largest difference between the probabilities of two sets of maps on some circuits. */
export function farthest(set: GateSet, a: NoisyMaps, b: NoisyMaps, circuits: readonly { gates: readonly string[] }[]): number {
  const p = slowProbabilities(set, a, circuits);
  const q = slowProbabilities(set, b, circuits);
  return p.reduce((most, v, i) => Math.max(most, Math.abs(v - q[i]!)), 0);
}
