import type { FigureKey, GateDeclaration } from '#shared/formats/types.ts';
import { emptyGradients, FunctionalGradient, type IdealPatch, type IdealRegister, type PatchGradients } from '#shared/method/chain/functional-gradient.ts';
import { designMatrix } from '#shared/method/design.ts';
import { lossGradient } from '#shared/method/determined.ts';
import { readWithError, varianceAtOneShot } from '#shared/method/forecast-variance.ts';
import { gaugeDirections } from '#shared/method/gauge.ts';
import { idealGateSet, indexCircuits } from '#shared/method/gate-set.ts';
import { angleGradient } from '#shared/method/gradients.ts';
import { invertDesign, type Inverse } from '#shared/method/inverse.ts';
import { layoutOf } from '#shared/method/parameters.ts';

interface PlainCircuits { qubits: readonly number[]; circuits: readonly { gates: readonly string[] }[] }

export interface ChainForecastInput {
  gates: readonly GateDeclaration[];
  registerSize: number;
  /** Circuits to estimate from: one patch a qubit, in order, then one a pair. */
  locals: readonly PlainCircuits[];
  pairs: readonly PlainCircuits[];
  shots: number;
  /** Bench circuits over the whole register. */
  bench: readonly { depth: number; circuits: readonly { gates: readonly string[] }[] }[];
  readoutError: number;
}

export interface ChainForecastFigure {
  key: FigureKey;
  depth: number | null;
  gate: string | null;
  qubits: readonly number[];
  /** Null where a patch it rests on is not complete. */
  standardError: number | null;
}

export interface ChainForecast {
  figures: ChainForecastFigure[];
  /** Of the pair with the smallest ratio. */
  rank: number;
  conditionRatio: number;
}

interface PosedPatch extends IdealPatch {
  inverse: Inverse;
  complete: boolean;
  gates: readonly (readonly string[])[];
  probabilities: Float64Array;
}

function pose({ gates, readoutError }: ChainForecastInput, { qubits, circuits }: PlainCircuits): PosedPatch {
  const set = idealGateSet(gates, qubits);
  const entangling = new Set(set.labels.flatMap((label, k) => (gates.find((g) => g.label === label)!.targets.length > 1 ? [k] : [])));
  const layout = layoutOf(set, qubits.length > 1 ? entangling : undefined);
  const indexed = indexCircuits(set, circuits);
  const gauge = gaugeDirections(set, layout);
  const inverse = invertDesign(designMatrix(set, layout, indexed), gauge);
  return { qubits, set, layout, inverse, complete: inverse.rank === layout.columns - gauge.dimension, gates: circuits.map((c) => c.gates), probabilities: readWithError(set, indexed, readoutError) };
}

/** Weights over all outcomes from weights over the rows of a design, which leave the last outcome out. */
const withLastOutcome = (rows: Float64Array, c: number, d: number): Float64Array => Float64Array.from({ length: d }, (_, o) => (o < d - 1 ? rows[c * (d - 1) + o]! : 0));

/**
 * Standard errors of a chained register before a shot is taken. A pair is estimated with its locals held at their estimates,
 * so to first order e_pair = C_p⁺(f_p − J e_local), J = ∂p_pair/∂e_local at the ideal gates. With gradients g of a figure, the
 * pair's counts weigh w_p = (C_p⁺)ᵀg_p and the locals' weigh (C_l⁺)ᵀ(g_l − Σ_p Jᵀw_p); counts of different patches are
 * independent, so their variances WΣWᵀ add (method M1, run sheets). Falls as 1/shots exactly.
 * Cost: one inverse a patch, one pass over the pairs' circuits a figure; three qubits about a second.
 */
export function forecastChain(input: ChainForecastInput): ChainForecast {
  const locals = input.locals.map((patch) => pose(input, patch));
  const pairs = input.pairs.map((patch) => pose(input, patch));
  const register: IdealRegister = { locals, pairs };
  const onPairs = pairs.map((pair) => new FunctionalGradient(register, pair.qubits));
  const whole = new FunctionalGradient(register, Array.from({ length: input.registerSize }, (_, q) => q));
  const all = [...locals, ...pairs];

  const errorOf = (gradients: PatchGradients): number | null => {
    const carried = { locals: gradients.locals.map((g) => g.slice()), pairs: pairs.map((p) => new Float64Array(p.layout.columns)) };
    let variance = 0;
    const touches = (g: Float64Array): boolean => g.some((v) => v !== 0);
    for (const [p, pair] of pairs.entries()) {
      if (!touches(gradients.pairs[p]!)) continue;
      if (!pair.complete) return null;
      const weights = pair.inverse.applyTranspose(gradients.pairs[p]!);
      variance += varianceAtOneShot(weights, pair.probabilities, 4);
      const down = weights.map((w) => -w);
      pair.gates.forEach((gates, c) => onPairs[p]!.add(gates, withLastOutcome(down, c, 4), carried));
    }
    for (const [q, local] of locals.entries()) {
      if (!touches(carried.locals[q]!)) continue;
      if (!local.complete) return null;
      variance += varianceAtOneShot(local.inverse.applyTranspose(carried.locals[q]!), local.probabilities, 2);
    }
    return Math.sqrt(variance / input.shots);
  };
  const onPatch = (patch: PosedPatch, gradient: Float64Array): PatchGradients => {
    const out = emptyGradients(register);
    const at = all.indexOf(patch);
    if (at < locals.length) out.locals[at] = gradient;
    else out.pairs[at - locals.length] = gradient;
    return out;
  };

  const figures: ChainForecastFigure[] = [];
  const qubits = [...locals.keys()];
  const signal = (circuits: readonly { gates: readonly string[] }[], sign: number): PatchGradients => {
    const out = emptyGradients(register);
    const weights = circuits.map(({ gates }) => whole.probabilities(gates).map((p) => p - 2 ** -input.registerSize));
    const size = weights.reduce((sum, row) => sum + row.reduce((s, w) => s + w * w, 0), 0);
    circuits.forEach(({ gates }, c) => whole.add(gates, weights[c]!.map((w) => (sign * w) / size), out));
    return out;
  };
  for (const { depth, circuits } of input.bench) figures.push({ key: 'retained-signal', depth, gate: null, qubits, standardError: errorOf(signal(circuits, 1)) });
  for (const patch of all) {
    const estimated = patch.set.labels.flatMap((label, k) => (patch.layout.gateAt[k]! >= 0 ? [{ label, k }] : []));
    if (patch.qubits.length === 1) figures.push({ key: 'error-per-gate', depth: null, gate: null, qubits: patch.qubits, standardError: errorOf(onPatch(patch, lossGradient(patch, estimated.map(({ k }) => k)))) });
    for (const { label, k } of estimated) {
      figures.push({ key: 'gate-loss', depth: null, gate: label, qubits: patch.qubits, standardError: errorOf(onPatch(patch, lossGradient(patch, [k]))) });
      const angle = angleGradient(patch, k);
      if (angle) figures.push({ key: 'angle-error', depth: null, gate: label, qubits: patch.qubits, standardError: errorOf(onPatch(patch, angle)) });
    }
  }
  figures.push({ key: 'readout-loss', depth: null, gate: null, qubits, standardError: errorOf(signal([{ gates: [] }], -1)) });
  const weakest = pairs.reduce((least, p) => (p.inverse.conditionRatio < least.inverse.conditionRatio ? p : least), pairs[0]!);
  return { figures, rank: weakest.inverse.rank, conditionRatio: weakest.inverse.conditionRatio };
}
