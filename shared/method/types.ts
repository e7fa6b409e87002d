import type { CircuitsFile, Dataset, GateClass, Prediction, Result, Seal } from '#shared/formats/types.ts';
import type { FactorStore } from '#shared/method/factors.ts';

export interface EstimateInput {
  /** A dataset that has passed the schema and the semantic checks. */
  dataset: Dataset;
  /** SHA-256 of the canonical form, hex: names the dataset in the result and seeds the bootstrap. */
  contentId: string;
  /** The class with its bench circuits; null for `custom` or an unknown class. */
  gateClass: GateClass | null;
  /** Method version; the official one unless told. */
  method?: string;
  /** Opened seal: those circuits are kept out of the estimate. Null: every circuit is used. */
  seal?: Seal | null;
  /** Circuits whose outcomes are to be predicted. */
  predict?: CircuitsFile | null;
  /** Circuits whose outcome probabilities are wanted beside the result, without intervals and at the cost of one replicate. */
  probabilitiesOf?: CircuitsFile | null;
  /** Where factors of designs are kept: they save time and change no bit. */
  factors?: FactorStore | null;
  /** Bootstrap replicates; 2,000 unless told. */
  replicates?: number;
  /** Called now and then with a stage and the share done, 0 to 1; the method's result never depends on it. */
  onProgress?: (progress: EstimateProgress) => void;
}

export interface EstimateProgress {
  stage: 'design' | 'inverse' | 'passes' | 'replicates' | 'figures';
  fraction: number;
  /** Replicates done so far, where that is the stage; in a chained register the mean over its patches. */
  replicatesDone?: number;
}

/** The companion `evenbeam.replicates`: one row a figure (in the order of result.figures), one column a replicate; NaN where the figure has none. */
export interface ReplicateTable {
  figures: number;
  replicates: number;
  /** Row-major, figures × replicates. Little-endian float64 when stored. */
  values: Float64Array;
}

export interface EstimateOutput {
  result: Result;
  replicates: ReplicateTable;
  /** What was asked for by `probabilitiesOf`; no part of the result. */
  probabilities: Prediction[];
}
