import type { SealedCheck } from '#shared/formats/types.ts';
import { ESTIMATE } from '#shared/method/chain/map-table.ts';
import { readRows, type ReadFigure } from '#shared/method/chain/read-rows.ts';
import type { RegisterMaps } from '#shared/method/chain/register-maps.ts';
import { planRegisterFigures, planRegisterSealed, RegisterReadings } from '#shared/method/chain/register-plans.ts';
import { replicatesRead } from '#shared/method/chain/register-predictions.ts';
import { droppedReason } from '#shared/method/patch-report.ts';
import type { ReadingContext } from '#shared/method/readings.ts';
import { SealedReference } from '#shared/method/sealed-check.ts';
import type { EstimateInput } from '#shared/method/types.ts';
import type { MethodVersion } from '#shared/method/versions.ts';
import { openStream } from '#shared/random/streams.ts';
import { meanTotalVariation } from '#shared/stats/distance.ts';

export interface RegisterFigures {
  retained: ReadFigure[];
  output: ReadFigure[];
  readout: ReadFigure;
  sealed: ReadFigure;
  check: SealedCheck | null;
}

const NOTHING = new Float64Array(0);

/** Figures of the whole register: bench circuits, readout loss, and what the sealed circuits say. */
export function readRegisterFigures({ dataset, contentId, gateClass, onProgress }: EstimateInput, method: MethodVersion, maps: RegisterMaps, sealedIds: ReadonlySet<string>, longest: number, count: number): RegisterFigures {
  const qubits = dataset.register.length;
  const readings = new RegisterReadings(maps, qubits);
  const { retained, output, readout } = planRegisterFigures(maps, dataset, gateClass, longest, readings);
  const sealed = planRegisterSealed(maps, dataset, sealedIds, readings);
  const probabilities = new Float64Array(readings.circuits.length * readings.d);
  // Figures of the register are read from probabilities alone: its maps are spread over the patches.
  const context: ReadingContext = { maps: { gates: NOTHING, state: NOTHING, effects: NOTHING }, probabilities };
  const contextOf = (row: number): ReadingContext | null => {
    readings.read(row, probabilities);
    return probabilities.every((p) => Number.isFinite(p)) ? context : null;
  };
  const reference = sealed.plan.reason === null ? referenceAt(readings, sealed.from, sealed.counts, openStream(contentId, method.id, 'sealed')) : null;
  const read = replicatesRead(qubits, count);
  const plans = [...retained, ...output, readout, sealed.plan];
  const found = readRows(plans, count, read, contextOf, (b) => {
    reference?.add(probabilities, sealed.from);
    if (b % 20 === 19) onProgress?.({ stage: 'figures', fraction: (b + 1) / read });
  }).map((figure) => withoutDropped(figure, read));
  const own = found[found.length - 1]!;
  const ideal = meanTotalVariation(sealed.ideal, 0, sealed.counts.observed, 0, sealed.counts.circuits, readings.d);
  return {
    retained: found.slice(0, retained.length), output: found.slice(retained.length, retained.length + output.length), readout: found[found.length - 2]!, sealed: own,
    check: reference && own.plan.reason === null && Number.isFinite(own.values.value) ? reference.check(own.values.value, ideal) : null,
  };
}

function referenceAt(readings: RegisterReadings, from: number, counts: ConstructorParameters<typeof SealedReference>[1], generator: ReturnType<typeof openStream>): SealedReference {
  const estimate = new Float64Array((readings.circuits.length - from) * readings.d);
  readings.read(ESTIMATE, estimate, from);
  return new SealedReference(estimate, counts, generator);
}

/** More than one replicate in a hundred left out of those read: the figure is not determined. */
function withoutDropped(figure: ReadFigure, read: number): ReadFigure {
  if (figure.plan.reason !== null) return figure;
  const kept = figure.values.replicates.subarray(0, read).reduce((n, v) => n + (Number.isFinite(v) ? 1 : 0), 0);
  return { ...figure, plan: { ...figure.plan, reason: droppedReason(read - kept, read) } };
}
