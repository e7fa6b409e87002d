import { orthonormalBasis } from '#shared/linalg/orthonormal.ts';
import { SparseBuilder, type SparseRows } from '#shared/linalg/sparse.ts';
import type { Gauge } from '#shared/method/gauge.ts';
import type { GateSet } from '#shared/method/gate-set.ts';
import type { StructuredCircuit, StructuredPlan } from '#shared/runsheet/structured-plan.ts';

/** Preparations, gates and readouts as vectors and matrices, one after another: P·D, K·D², R·D (effect of outcome 0). */
export interface StructuredMaps {
  preparations: Float64Array;
  gates: Float64Array;
  readouts: Float64Array;
}

const timesVector = (g: Float64Array, at: number, v: Float64Array, D: number): Float64Array =>
  Float64Array.from({ length: D }, (_, a) => {
    let s = 0;
    for (let b = 0; b < D; b++) s += g[at + a * D + b]! * v[b]!;
    return s;
  });

const pulledBack = (g: Float64Array, at: number, m: Float64Array, D: number): Float64Array =>
  Float64Array.from({ length: D }, (_, b) => {
    let s = 0;
    for (let a = 0; a < D; a++) s += m[a]! * g[at + a * D + b]!;
    return s;
  });

/** A circuit of the model: places of its sequences, and the gates of its repeated block in order of time. */
interface Circuit {
  preparation: number;
  middle: number[];
  readout: number;
}

/**
 * Structured circuits of one qubit: p(0) = r_j · B^m · p_i, with a state p_i of its own for each preparation sequence, an effect r_j
 * for each readout sequence, and blocks B that are products of the gates. Parameters, in this order: for each gate its error map
 * E (G̃ = (1 + E)G, rows 2…D), for each preparation δp (components 2…D), for each readout δr.
 */
export class StructuredModel {
  readonly D: number;
  readonly columns: number;
  readonly ideal: StructuredMaps;
  private readonly blocks: number[][];
  private readonly circuits: readonly Circuit[];
  private readonly preparationAt: number;
  private readonly readoutAt: number;

  constructor(set: GateSet, plan: StructuredPlan, circuits: readonly StructuredCircuit[]) {
    const D = set.D;
    this.D = D;
    const place = new Map(set.labels.map((label, k) => [label, k]));
    this.blocks = plan.blocks.map((block) => block.map((label) => place.get(label)!));
    this.circuits = circuits.map((c) => this.take(c));
    const gate = (label: string): Float64Array => set.gates[place.get(label)!]!;
    this.ideal = {
      preparations: Float64Array.from(plan.preparations.flatMap((s) => [...s.reduce<Float64Array>((v, label) => timesVector(gate(label), 0, v, D), set.state)])),
      gates: Float64Array.from(set.gates.flatMap((g) => [...g])),
      readouts: Float64Array.from(plan.readouts.flatMap((s) => [...s.reduceRight<Float64Array>((m, label) => pulledBack(gate(label), 0, m, D), set.effects[0]!)])),
    };
    this.preparationAt = set.gates.length * D * (D - 1);
    this.readoutAt = this.preparationAt + plan.preparations.length * (D - 1);
    this.columns = this.readoutAt + plan.readouts.length * D;
  }

  private take({ preparation, block, power, readout }: StructuredCircuit): Circuit {
    return { preparation, middle: Array.from({ length: power }, () => this.blocks[block]!).flat(), readout };
  }

  /** Maps of a parameter vector. */
  at(e: Float64Array): StructuredMaps {
    const { D, ideal, preparationAt, readoutAt } = this;
    const out = { preparations: ideal.preparations.slice(), gates: ideal.gates.slice(), readouts: ideal.readouts.slice() };
    for (let base = 0, from = 0; base < out.gates.length; base += D * D, from += D * (D - 1)) {
      for (let i = 1; i < D; i++) {
        for (let m = 0; m < D; m++) {
          const w = e[from + (i - 1) * D + m]!;
          for (let j = 0; j < D; j++) out.gates[base + i * D + j]! += w * ideal.gates[base + m * D + j]!;
        }
      }
    }
    for (let p = 0; p * D < out.preparations.length; p++) for (let a = 1; a < D; a++) out.preparations[p * D + a]! += e[preparationAt + p * (D - 1) + a - 1]!;
    for (let a = 0; a < out.readouts.length; a++) out.readouts[a]! += e[readoutAt + a]!;
    return out;
  }

  /** Probability of outcome 0 of the model's own circuits, or of others. */
  probabilities(maps: StructuredMaps, others?: readonly StructuredCircuit[]): Float64Array {
    const { D } = this;
    return Float64Array.from(others ? others.map((c) => this.take(c)) : this.circuits, ({ preparation, middle, readout }) => {
      let v: Float64Array = maps.preparations.slice(preparation * D, (preparation + 1) * D);
      for (const k of middle) v = timesVector(maps.gates, k * D * D, v, D);
      let p = 0;
      for (let a = 0; a < D; a++) p += maps.readouts[readout * D + a]! * v[a]!;
      return p;
    });
  }

  /** ∂p/∂e at the ideal maps, one row a circuit: for a gate the sum over its places of (what follows) ⊗ (what came before). */
  design(): SparseRows {
    const { D, ideal, preparationAt, readoutAt } = this;
    const builder = new SparseBuilder(this.columns);
    const row = new Float64Array(this.columns);
    for (const { preparation, middle, readout } of this.circuits) {
      const forward: Float64Array[] = [ideal.preparations.slice(preparation * D, (preparation + 1) * D)];
      for (const k of middle) forward.push(timesVector(ideal.gates, k * D * D, forward[forward.length - 1]!, D));
      let b: Float64Array = ideal.readouts.slice(readout * D, (readout + 1) * D);
      for (let a = 0; a < D; a++) row[readoutAt + readout * D + a] = forward[middle.length]![a]!;
      for (let m = middle.length; m >= 1; m--) {
        const k = middle[m - 1]!;
        for (let i = 1; i < D; i++) for (let j = 0; j < D; j++) row[k * D * (D - 1) + (i - 1) * D + j]! += b[i]! * forward[m]![j]!;
        b = pulledBack(ideal.gates, k * D * D, b, D);
      }
      for (let a = 1; a < D; a++) row[preparationAt + preparation * (D - 1) + a - 1] = b[a]!;
      builder.push(row);
    }
    return builder.build();
  }

  /** Changes that no circuit sees: for each K with zero first row E = K − G K Gᵀ, δp = Kp, δr = −Kᵀr. */
  gauge(): Gauge {
    const { D, columns, ideal, preparationAt, readoutAt } = this;
    const count = D * (D - 1);
    const vectors = new Float64Array(count * columns);
    for (let i = 1; i < D; i++) {
      for (let j = 0; j < D; j++) {
        const at = ((i - 1) * D + j) * columns;
        for (let base = 0, from = at; base < ideal.gates.length; base += D * D, from += D * (D - 1)) {
          vectors[from + (i - 1) * D + j]! += 1;
          for (let a = 1; a < D; a++) for (let b = 0; b < D; b++) vectors[from + (a - 1) * D + b]! -= ideal.gates[base + a * D + i]! * ideal.gates[base + b * D + j]!;
        }
        for (let p = 0; p * D < ideal.preparations.length; p++) vectors[at + preparationAt + p * (D - 1) + i - 1] = ideal.preparations[p * D + j]!;
        for (let r = 0; r * D < ideal.readouts.length; r++) vectors[at + readoutAt + r * D + j] = -ideal.readouts[r * D + i]!;
      }
    }
    const { basis, dimension } = orthonormalBasis(vectors, count, columns);
    return { dimension, basis };
  }
}
