import { matchGates } from '#shared/formats/match-gates.ts';
import type { SparseRows } from '#shared/linalg/sparse.ts';
import { LARGEST_PARAMETER, PASSES } from '#shared/method/constants.ts';
import { invertDesign, type Inverse } from '#shared/method/inverse.ts';
import { emptyMaps, type NoisyMaps } from '#shared/method/parameters.ts';
import { SOUND_RATIO } from '#shared/linalg/tolerances.ts';
import { StructuredModel, type StructuredMaps } from '#shared/opinions/structured-model.ts';
import type { PatchCase } from '#shared/opinions/patch-case.ts';
import { readStructure, structuredPlan, type StructuredCircuit, type StructuredPlan } from '#shared/runsheet/structured-plan.ts';
import { structureOf } from '#shared/runsheet/sheet-plan.ts';

export interface StructuredEstimate {
  maps: NoisyMaps;
  /** Probabilities of the sealed circuits, circuits × 2; null where one of them has not the form. */
  sealed: Float64Array | null;
  inverse: Pick<Inverse, 'rank' | 'columns' | 'conditionRatio'>;
  fitted: StructuredMaps;
}

export type StructuredAnswer = { ok: true; estimate: StructuredEstimate } | { ok: false; reason: string };

/** The plan in the labels of the dataset: that of the gate class where there is one, so that the order of declaration is no matter. */
function planOf({ gateClass, declared, qubits, problem }: PatchCase): StructuredPlan {
  if (!gateClass) return structuredPlan(declared, qubits[0]!, problem.longest);
  const { labels } = matchGates(gateClass.gates, declared);
  const told = (sequences: string[][]): string[][] => sequences.map((s) => s.map((label) => labels.get(label) ?? label));
  const plan = structureOf(gateClass);
  return { ...plan, preparations: told(plan.preparations), blocks: told(plan.blocks), readouts: told(plan.readouts) };
}

/** Readings of a set of circuits, one after another; each circuit weighs as much as any other, however many readings it has. */
interface Readings {
  parts: StructuredCircuit[];
  /** Circuit of each reading, and the root of its share in it. */
  circuit: number[];
  weight: number[];
}

/** Null where a circuit has no reading; then how many have none. */
function readAll(circuits: readonly { gates: readonly string[] }[], plan: StructuredPlan): Readings | number {
  const all = circuits.map(({ gates }) => readStructure(gates, plan));
  const without = all.filter((r) => r.length === 0).length;
  if (without > 0) return without;
  return { parts: all.flat(), circuit: all.flatMap((r, c) => r.map(() => c)), weight: all.flatMap((r) => r.map(() => 1 / Math.sqrt(r.length))) };
}

function weighted(design: SparseRows, weight: readonly number[]): SparseRows {
  const value = design.value.slice();
  for (let i = 0; i < design.rows; i++) for (let e = design.start[i]!; e < design.start[i + 1]!; e++) value[e]! *= weight[i]!;
  return { ...design, value };
}

/** e ← e + C⁺(f − p(e)) from e = 0, eight times, as the official method does. Null where it runs away. */
function solve(model: StructuredModel, inverse: Inverse, { parts, circuit, weight }: Readings, observed: Float64Array): Float64Array | null {
  const e = new Float64Array(model.columns);
  const residual = new Float64Array(4 * parts.length);
  const step = new Float64Array(4 * model.columns);
  for (let pass = 0; pass < PASSES; pass++) {
    const p = model.probabilities(model.at(e));
    for (let i = 0; i < p.length; i++) residual[4 * i] = weight[i]! * (observed[circuit[i]!]! - p[i]!);
    inverse.apply(residual, step, 1);
    for (let j = 0; j < e.length; j++) e[j]! += step[4 * j]!;
    if (e.some((v) => !(Math.abs(v) <= LARGEST_PARAMETER))) return null;
  }
  return e;
}

/** Both outcomes of each circuit; of several readings their mean. Null where a circuit has no reading. */
function predictSealed(model: StructuredModel, fitted: StructuredMaps, circuits: readonly { gates: readonly string[] }[], plan: StructuredPlan): Float64Array | null {
  const readings = readAll(circuits, plan);
  if (typeof readings === 'number') return null;
  const out = new Float64Array(2 * circuits.length);
  model.probabilities(fitted, readings.parts).forEach((p, i) => {
    const share = readings.weight[i]! * readings.weight[i]!;
    out[2 * readings.circuit[i]!]! += share * p;
    out[2 * readings.circuit[i]! + 1]! += share * (1 - p);
  });
  return out;
}

/** Preparation and readout are those of the empty sequences. */
function gateMaps({ problem }: PatchCase, plan: StructuredPlan, fitted: StructuredMaps): NoisyMaps {
  const { set } = problem;
  const { D } = set;
  const maps = emptyMaps(set);
  maps.gates.set(fitted.gates);
  const p = plan.preparations.findIndex((s) => s.length === 0);
  const r = plan.readouts.findIndex((s) => s.length === 0);
  maps.state.set(fitted.preparations.subarray(p * D, (p + 1) * D));
  maps.effects.set(fitted.readouts.subarray(r * D, (r + 1) * D));
  return maps;
}

/**
 * Linear analysis of a structured design: every circuit is a preparation sequence, a repeated block and a readout sequence. The
 * state of each preparation sequence and the effect of each readout sequence are unknowns of their own, so that nothing is assumed
 * about how sequences are made of gates; the model is linear about the ideal, inverted once, and applied in eight passes. The repetitions make small errors of a block add up, which is
 * what such designs are run for. A circuit that can be read in several ways gives an equation for each, all together of weight one. Offered for one qubit, where every circuit has the form and the design determines everything.
 * Cost: a singular value decomposition of circuits × about 80.
 */
export function structured(patch: PatchCase): StructuredAnswer {
  const { problem } = patch;
  if (problem.set.n !== 1) return { ok: false, reason: 'Offered for one qubit only: the sequences of a pair have some seven hundred parameters of their own beside those of its gates.' };
  const plan = planOf(patch);
  const readings = readAll(patch.circuits, plan);
  if (typeof readings === 'number') return { ok: false, reason: `Offered for structured run sheets: ${readings} of ${patch.circuits.length} circuits are not a preparation sequence, a repeated block and a readout sequence.` };
  const model = new StructuredModel(problem.set, plan, readings.parts);
  const gauge = model.gauge();
  const inverse = invertDesign(weighted(model.design(), readings.weight), gauge);
  const full = model.columns - gauge.dimension;
  if (inverse.rank !== full) return { ok: false, reason: `Not determined: the circuits determine ${inverse.rank} of the ${full} combinations that sequences and gates allow.` };
  if (inverse.conditionRatio < SOUND_RATIO / 10) return { ok: false, reason: `Not determined: the circuits hold too little about sequences and gates (smallest to largest singular value ${inverse.conditionRatio.toPrecision(2)}).` };
  const e = solve(model, inverse, readings, problem.observed);
  if (!e) return { ok: false, reason: 'The passes ran away: the counts are too far from the ideal for this analysis.' };
  const fitted = model.at(e);
  return {
    ok: true,
    estimate: {
      maps: gateMaps(patch, plan, fitted), fitted, inverse, sealed: predictSealed(model, fitted, patch.sealed.source, plan),
    },
  };
}
