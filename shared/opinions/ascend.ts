import { Cholesky } from '#shared/linalg/cholesky.ts';
import { addGram } from '#shared/linalg/gram.ts';
import { designMatrix } from '#shared/method/design.ts';
import { withLast } from '#shared/method/frequencies.ts';
import type { GateSet } from '#shared/method/gate-set.ts';
import { applyParameters, emptyMaps, type NoisyMaps } from '#shared/method/parameters.ts';
import type { PatchProblem } from '#shared/method/patch-problem.ts';
import { logLikelihood, scoreOf } from '#shared/opinions/log-likelihood.ts';

/** Damping, in shares of the mean Fisher information: too little to slow any direction that counts speak of, enough for those that none does. */
const LEAST_DAMPING = 1e-7;
const MOST_DAMPING = 1e5;

/** Stationary: the step that is left is shorter than a thousandth of a standard error, in every direction together. */
export const STATIONARY = 1e-3;

/** Under a constraint: a step that gains less than this is the last. A thousandth of a natural unit says nothing about a device. */
const LAST_GAIN = 1e-3;

export interface AscentOptions {
  /** Most iterations: each costs a design, a Gram matrix and a factorisation. */
  limit: number;
  /** Brings maps back to those that are allowed; they must be so at the start. */
  project?: (maps: NoisyMaps) => NoisyMaps;
}

export interface Ascent {
  maps: NoisyMaps;
  converged: boolean;
  iterations: number;
  /** Log-likelihood at the start and after each accepted step. */
  path: number[];
  /** √gᵀF⁻¹g at the end; null under a constraint. */
  remaining: number | null;
}

/** Maps as the gate set that a design is taken at; the last effect is the complement of the others. */
function gateSetAt(set: GateSet, maps: NoisyMaps): GateSet {
  const { D, d } = set;
  const effects = Array.from({ length: d - 1 }, (_, o) => maps.effects.subarray(o * D, (o + 1) * D));
  const last = new Float64Array(D);
  for (let a = 0; a < D; a++) last[a] = effects.reduce((rest, m) => rest - m[a]!, a === 0 ? Math.sqrt(d) : 0);
  return { ...set, gates: set.gates.map((_, k) => maps.gates.subarray(k * D * D, (k + 1) * D * D)), state: maps.state, effects: [...effects, last] };
}

/**
 * Maximises the multinomial log-likelihood over trace-preserving maps, preparations and effects by Fisher scoring with
 * Levenberg–Marquardt damping ("An algorithm for least-squares estimation of nonlinear parameters", J. Soc. Ind. Appl. Math. 11,
 * 431, 1963; memory): δ = (F + λ·mean(diag F)·1)⁻¹g with gradient g and Fisher information F at the current maps, then
 * G ← (1 + δ_G)G, ρ ← ρ + δ_ρ, M ← M + δ_M. First rows of δ are zero, so the trace is preserved exactly at every step. A step is
 * taken only if the log-likelihood rises; otherwise λ grows tenfold, towards a short step along the gradient. Directions that no
 * circuit sees have no gradient and stay where they are. With `project` each trial is first brought back to the allowed maps.
 * Cost an iteration: rows·columns² for F and columns³/6 for its factor; a pair with 1,200 circuits about two seconds.
 */
export function ascend(problem: PatchProblem, start: NoisyMaps, { limit, project }: AscentOptions): Ascent {
  const { set, layout, circuits, counts, evaluator } = problem;
  const { columns } = layout;
  const rows = new Float64Array(circuits.length * (set.d - 1));
  const probabilities = (maps: NoisyMaps): Float64Array => {
    evaluator.run(maps, rows);
    return withLast(rows, circuits.length, set.d);
  };
  let maps = start;
  let p = probabilities(maps);
  let reached = logLikelihood(counts, p);
  const path = [reached];
  const step = new Float64Array(4 * columns);
  let damping = LEAST_DAMPING;
  for (let iteration = 0; iteration < limit; iteration++) {
    const here = gateSetAt(set, maps);
    const { gradient, rows: weighted } = scoreOf(counts, p, designMatrix(here, layout, circuits));
    const fisher = new Float64Array(columns * columns);
    addGram(weighted, fisher);
    const diagonal = Float64Array.from({ length: columns }, (_, j) => fisher[j * columns + j]!);
    const mean = diagonal.reduce((s, v) => s + v, 0) / columns;
    let accepted = false;
    for (; damping <= MOST_DAMPING && !accepted; damping *= 10) {
      for (let j = 0; j < columns; j++) fisher[j * columns + j] = diagonal[j]! + damping * mean;
      const factor = Cholesky.factor(fisher, columns);
      if (!factor) continue;
      step.fill(0);
      for (let j = 0; j < columns; j++) step[4 * j] = gradient[j]!;
      factor.solve(step, 1);
      const delta = Float64Array.from({ length: columns }, (_, j) => step[4 * j]!);
      const left = Math.sqrt(Math.max(0, delta.reduce((s, v, j) => s + v * gradient[j]!, 0)));
      if (!project && left <= STATIONARY && damping === LEAST_DAMPING) return { maps, converged: true, iterations: iteration, path, remaining: left };
      const free = emptyMaps(set);
      applyParameters(here, layout, delta, free);
      const trial = project ? project(free) : free;
      const q = probabilities(trial);
      const value = logLikelihood(counts, q);
      if (!(value > reached)) continue;
      const gain = value - reached;
      [maps, p, reached, accepted] = [trial, q, value, true];
      path.push(value);
      if (project && gain < LAST_GAIN) return { maps, converged: true, iterations: iteration + 1, path, remaining: null };
    }
    // No step in any direction raises the likelihood: under a constraint that is its edge, without one rounding has been reached.
    if (!accepted) return { maps, converged: project !== undefined, iterations: iteration, path, remaining: null };
    damping = Math.max(LEAST_DAMPING, damping / 100);
  }
  return { maps, converged: false, iterations: limit, path, remaining: null };
}
