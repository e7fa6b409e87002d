import type { Figure, FigureKey, Dataset, GateClass, Seal } from '#shared/formats/types.ts';

/** Other published routes from the same counts to the same figures, in the order in which they are shown. */
export const opinionMethods = ['single-pass', 'ideal-spam', 'likelihood', 'likelihood-positive', 'structured'] as const;
export type OpinionMethod = (typeof opinionMethods)[number];

export interface OpinionInput {
  /** A dataset that has passed the schema and the semantic checks. */
  dataset: Dataset;
  gateClass: GateClass | null;
  /** Opened seal: those circuits are kept out of every estimate and test its prediction. */
  seal: Seal | null;
  /** Figures of the official estimate, which distances are measured from. */
  official: readonly Figure[];
}

/** One figure by another route. */
export interface OpinionFigure {
  key: FigureKey;
  depth: number | null;
  gate: string | null;
  qubits: number[];
  /** Null with a reason where this route does not determine it. */
  value: number | null;
  reason: string | null;
  official: number | null;
  /** Standard error of the official figure. */
  officialError: number | null;
  /** (value − official)/standard error of the official figure; null where either is missing or the error is zero. */
  distance: number | null;
}

/** How an iterative route ended. */
export interface Convergence {
  converged: boolean;
  iterations: number;
  limit: number;
  /** Log-likelihood gained over the official estimate, in natural units; negative where a constraint costs some. */
  gain: number;
  /** Length of the step still left, in standard errors of the estimate (√gᵀF⁻¹g); null where a constraint bounds it. */
  remaining: number | null;
}

/** Mean total variation distance on the sealed circuits: of this route, of the official estimate, of the ideal model. */
export interface PredictionComparison {
  value: number;
  official: number;
  ideal: number;
  circuits: number;
}

export interface Opinion {
  method: OpinionMethod;
  /** Why this route is not offered for the dataset, or null. */
  reason: string | null;
  /** What it was applied to: the whole register, or each one-qubit patch of a chained one by itself. */
  scope: 'register' | 'one-qubit-patches';
  figures: OpinionFigure[];
  prediction: PredictionComparison | null;
  convergence: Convergence | null;
  /** What a reader must know, in plain sentences. */
  notes: string[];
}
