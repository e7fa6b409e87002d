import { limits } from '#shared/formats/limits.ts';
import { checkFiles } from '#shared/recompute/check-files.ts';
import { compareResults } from '#shared/recompute/compare.ts';
import { recompute } from '#shared/recompute/recompute.ts';
import type { EstimateProgress } from '#shared/method/types.ts';
import { fetchFile } from './fetch-file.ts';
import type { RecomputeOutcome, RecomputeProgress, RecomputeRequest } from './messages.ts';

/** Share of the whole at which each stage of the method begins, and how much it takes; measured on one qubit and on a pair. */
const spans: Readonly<Record<EstimateProgress['stage'], [from: number, span: number]>> = { design: [0.06, 0.04], inverse: [0.1, 0.1], passes: [0.2, 0.05], replicates: [0.25, 0.45], figures: [0.7, 0.27] };
const mostReplicateBytes = 8 * limits.bytes;

/** Fetches the files of an entry, holds them to the record, estimates again and compares. Runs in a worker; calls `report` as it goes. */
export async function runRecompute({ links, recorded }: RecomputeRequest, report: (progress: RecomputeProgress) => void): Promise<RecomputeOutcome> {
  const started = performance.now();
  const tell = (stage: RecomputeProgress['stage'], fraction: number): void => report({ stage, fraction, replicatesDone: null, replicates: null });
  const seconds = (): number => (performance.now() - started) / 1000;
  tell('files', 0);
  const [dataset, result, seal, runSheet] = await Promise.all([
    fetchFile(links.dataset, 'dataset', limits.bytes), fetchFile(links.result, 'result', limits.bytes),
    links.seal === null ? null : fetchFile(links.seal, 'seal', limits.bytes), links.runSheet === null ? null : fetchFile(links.runSheet, 'run sheet', limits.bytes),
  ]);
  tell('checks', 0.03);
  const { checks, ready } = checkFiles({ dataset, result, seal, runSheet, replicates: null }, recorded);
  if (!ready) return { checks, comparison: null, seconds: seconds() };
  const { replicates } = ready.result;
  const again = recompute(ready, ({ stage, fraction, replicatesDone }) => {
    const [from, span] = spans[stage];
    report({ stage, fraction: from + span * fraction, replicatesDone: replicatesDone ?? null, replicates });
  });
  tell('comparison', 0.98);
  const compare = (bytes: Uint8Array | null) => compareResults(ready.result, recorded.resultSha256, { sha256: recorded.replicatesSha256, bytes }, again, ready.dataset);
  let comparison = compare(null);
  // Their digest is enough where it fits; only where it does not are the frozen replicates fetched to see by how much.
  if (comparison.replicates.agreement !== 'identical') comparison = compare(await fetchFile(links.replicates, 'file of replicates', mostReplicateBytes));
  return { checks, comparison, seconds: seconds() };
}
