import type { Figure, PatchResult } from '#shared/formats/types.ts';
import { reportLocal, reportPair, warnOfLocal, warnOfPair } from '#shared/method/chain/chain-report.ts';
import { estimateChain, type ChainEstimate } from '#shared/method/chain/estimate-chain.ts';
import { readGateFigures } from '#shared/method/chain/gate-figures.ts';
import type { ReadFigure } from '#shared/method/chain/read-rows.ts';
import { readRegisterFigures } from '#shared/method/chain/register-figures.ts';
import { registerMaps } from '#shared/method/chain/register-maps.ts';
import { predictRegister } from '#shared/method/chain/register-predictions.ts';
import { DEFAULT_REPLICATES } from '#shared/method/constants.ts';
import { writeFigure } from '#shared/method/figure-plan.ts';
import type { EstimateInput, EstimateOutput } from '#shared/method/types.ts';
import type { MethodVersion } from '#shared/method/versions.ts';

/**
 * The estimate of a chained dataset: one-qubit patches jointly, pairs on their results, and the register put together from
 * both. Random streams: `openStream` with the place of the patch in the file.
 */
export function estimateChained(input: EstimateInput, method: MethodVersion): EstimateOutput {
  const { dataset, contentId, onProgress } = input;
  const { register } = dataset;
  const count = input.replicates ?? DEFAULT_REPLICATES;
  const sealed = new Set(input.seal?.sealed ?? []);
  onProgress?.({ stage: 'design', fraction: 0 });
  const chain = estimateChain({ gates: dataset.gates, contentId, method, sealed, factors: input.factors ?? null, count, onProgress: (fraction) => onProgress?.({ stage: 'replicates', fraction, replicatesDone: Math.floor(fraction * count) }) }, dataset);
  onProgress?.({ stage: 'replicates', fraction: 1, replicatesDone: count });
  const maps = registerMaps(dataset.gates, new Map(chain.locals.map((l) => [l.qubit, l])), chain.pairs);
  const gates = readGateFigures(chain, count);
  const whole = readRegisterFigures(input, method, maps, sealed, chain.longest, count);
  const all = [...whole.retained, ...whole.output, ...gates.error, ...gates.loss, ...gates.angle, whole.readout, whole.sealed];
  const table = new Float64Array(all.length * count);
  all.forEach(({ values }, i) => table.set(values.replicates, i * count));
  const { patches, warnings } = reportChain(chain, register, count);
  onProgress?.({ stage: 'figures', fraction: 1 });
  return {
    result: {
      format: 'evenbeam.result', formatVersion: '1.0.0', method: method.id, datasetSha256: contentId, replicates: count,
      sealed: dataset.patches.reduce((n, p) => n + p.circuits.filter((c) => sealed.has(c.id)).length, 0),
      patches, figures: all.map(figureOf), sealedCheck: whole.check, warnings,
      predictions: input.predict ? predictRegister(maps, register, count, input.predict.circuits) : [],
    },
    replicates: { figures: all.length, replicates: count, values: table },
    probabilities: input.probabilitiesOf ? predictRegister(maps, register, 0, input.probabilitiesOf.circuits) : [],
  };
}

const figureOf = ({ plan, values }: ReadFigure): Figure => writeFigure(plan, values, false);

/** Patches in file order, those that nothing is estimated from left out, and what a reader must be told. */
function reportChain({ locals, pairs, idle }: ChainEstimate, register: readonly string[], count: number): { patches: PatchResult[]; warnings: string[] } {
  const parts = [
    ...locals.map((l) => ({ place: l.patch, report: () => reportLocal(l), warnings: () => warnOfLocal(l, register, count) })),
    ...pairs.map((p) => ({ place: p.patch, report: () => reportPair(p), warnings: () => warnOfPair(p, register) })),
  ].sort((a, b) => a.place - b.place);
  const unused = idle.map(({ qubits }) => `Patch of ${qubits.map((q) => register[q]).join(' and ')}: No gate acts on both of these qubits, so nothing is estimated from it.`);
  return { patches: parts.map((p) => p.report()), warnings: [...parts.flatMap((p) => p.warnings()), ...unused] };
}
