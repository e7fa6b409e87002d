import type { FigureKey } from '#shared/formats/types.ts';
import { isDetermined, lossGradient, weightedRows, type Determining } from '#shared/method/determined.ts';
import { GateLoss } from '#shared/method/gate-loss.ts';
import { indexCircuits } from '#shared/method/gate-set.ts';
import { idealProbabilities } from '#shared/method/readings.ts';
import { complexMultiply, complexSquare } from '#shared/quantum/complex-matrix.ts';

export interface ForecastFigure {
  key: FigureKey;
  depth: number | null;
  gate: string | null;
}

export interface FigureGradient {
  figure: ForecastFigure;
  /** ∂figure/∂e at the ideal gates, over the columns. */
  gradient: Float64Array;
  determined: boolean;
}

/** The linear part of each figure at the ideal gates: retained signal by depth, error per gate, gate loss, angle error, readout loss. */
export function gradientRows(problem: Determining, bench: readonly { depth: number; circuits: readonly { gates: readonly string[] }[] }[]): FigureGradient[] {
  const { set } = problem;
  const out: FigureGradient[] = [];
  const add = (key: FigureKey, depth: number | null, gate: string | null, gradient: Float64Array) =>
    out.push({ figure: { key, depth, gate }, gradient, determined: problem.complete || isDetermined(problem, gradient) });
  for (const { depth, circuits } of bench) add('retained-signal', depth, null, signalGradient(problem, indexCircuits(set, circuits)));
  add('error-per-gate', null, null, lossGradient(problem, set.gates.map((_, k) => k)));
  set.labels.forEach((gate, k) => add('gate-loss', null, gate, lossGradient(problem, [k])));
  set.labels.forEach((gate, k) => {
    const gradient = angleGradient(problem, k);
    if (gradient) add('angle-error', null, gate, gradient);
  });
  add('readout-loss', null, null, signalGradient(problem, [new Int32Array(0)]).map((v) => -v));
  return out;
}

function signalGradient(problem: Determining, circuits: readonly Int32Array[]): Float64Array {
  const weights = idealProbabilities(problem.set, circuits).map((p) => p - 1 / problem.set.d);
  const size = weights.reduce((s, w) => s + w * w, 0);
  return weightedRows(problem, circuits, weights).map((v) => v / size);
}

/**
 * Angle error to first order: Im tr(Π E)/m, Π the projector on the eigenspace of μ (dimension m), formed from the other
 * distinct eigenvalues ν as the product of (G − ν)/(μ − ν). Null where the gate turns nothing.
 */
export function angleGradient(problem: Pick<Determining, 'set' | 'layout'>, k: number): Float64Array | null {
  const { D, gates } = problem.set;
  const spectrum = new GateLoss(gates[k]!, D).turningSpectrum();
  if (!spectrum) return null;
  const [mu, ...others] = spectrum;
  let projector = complexSquare(D);
  for (let i = 0; i < D; i++) projector.re[i * D + i] = 1;
  for (const nu of others) {
    const dr = mu!.re - nu.re;
    const di = mu!.im - nu.im;
    const scale = dr * dr + di * di;
    const factor = complexSquare(D);
    for (let i = 0; i < D * D; i++) {
      const diagonal = i % (D + 1) === 0;
      const re = gates[k]![i]! - (diagonal ? nu.re : 0);
      const im = diagonal ? -nu.im : 0;
      factor.re[i] = (re * dr + im * di) / scale;
      factor.im[i] = (im * dr - re * di) / scale;
    }
    projector = complexMultiply(projector, factor);
  }
  const w = new Float64Array(problem.layout.columns);
  for (let a = 1; a < D; a++) for (let b = 0; b < D; b++) w[problem.layout.gateAt[k]! + (a - 1) * D + b] = projector.im[b * D + a]! / mu!.times;
  return w;
}
