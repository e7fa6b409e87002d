import type { SealedPoint } from '#shared/contracts/entries.ts';
import type { BlockMisfit } from '#shared/domain/checks.ts';
import { canonicalJson, sha256Hex } from '#shared/formats/canonical-json.ts';
import { littleEndianBytes } from '#shared/formats/float64.ts';
import type { PlainCircuit, Seal } from '#shared/formats/types.ts';
import { estimate } from '#shared/method/estimate.ts';
import type { EstimateProgress } from '#shared/method/types.ts';
import { summariseResult, type ResultSummary } from '#api/modules/submissions/result-summary.ts';
import { driftOf } from './drift.ts';
import { readStored } from './read-stored.ts';
import { sealedPointsOf } from './sealed-points.ts';
import { taskFactors, type Factors } from './task-factors.ts';

export interface EstimateDatasetInput {
  bytes: Uint8Array;
  /** The opened seal where the dataset matched its run sheet. */
  seal: Seal | null;
  replicates: number;
  /** Factors that are kept for the designs of the dataset's run sheet. */
  factors?: Factors;
  /** Method version; the official one unless told. */
  method?: string;
}

export interface EstimateDatasetOutput {
  /** RFC 8785 bytes. */
  result: Uint8Array;
  resultSha256: string;
  /** float64, little-endian, figures × replicates. */
  replicates: Uint8Array;
  replicatesSha256: string;
  method: string;
  summary: ResultSummary;
  drift: BlockMisfit[];
  sealedPoints: SealedPoint[];
  /** Factors that were worked out and are worth keeping with the run sheet. */
  factors: Factors;
}

export interface EstimateReport {
  stage: string;
  fraction: number;
  replicatesDone?: number;
}

/** Share of the whole at which each stage of the method begins, and how much it takes; measured on one-qubit datasets. */
const spans: Readonly<Record<EstimateProgress['stage'], [from: number, span: number]>> = { design: [0.02, 0.03], inverse: [0.05, 0.05], passes: [0.1, 0.05], replicates: [0.15, 0.45], figures: [0.6, 0.3] };

/** The estimate of a stored dataset, and beside it what the review looks at: drift by block, sealed circuits one by one. */
export const estimateDataset = ({ bytes, seal, replicates, factors, method }: EstimateDatasetInput, report: (progress: EstimateReport) => void): EstimateDatasetOutput => {
  report({ stage: 'design', fraction: 0.01 });
  const { dataset, contentId, gateClass } = readStored(bytes);
  const circuits: PlainCircuit[] = dataset.patches.flatMap(({ qubits, circuits }) => circuits.map(({ id, gates }) => ({ id, qubits, gates })));
  const store = taskFactors(factors);
  const { result, replicates: table, probabilities } = estimate({
    dataset, contentId, gateClass, seal, replicates, factors: store, ...(method === undefined ? {} : { method }),
    probabilitiesOf: { format: 'evenbeam.circuits', formatVersion: '1.0.0', circuits },
    onProgress: ({ stage, fraction, replicatesDone }) => report({ stage, fraction: spans[stage][0] + spans[stage][1] * fraction, ...(replicatesDone === undefined ? {} : { replicatesDone }) }),
  });
  report({ stage: 'diagnostics', fraction: 0.9 });
  const sealed = new Set(seal?.sealed ?? []);
  const canonical = new TextEncoder().encode(canonicalJson(result));
  const stored = littleEndianBytes(table.values);
  return {
    result: canonical,
    resultSha256: sha256Hex(canonical),
    replicates: stored,
    replicatesSha256: sha256Hex(stored),
    method: result.method,
    summary: summariseResult(result, dataset, sealed),
    drift: driftOf(dataset, contentId, sealed, result, probabilities),
    sealedPoints: sealedPointsOf(dataset, sealed, probabilities),
    factors: store.made,
  };
};
