import type { Figure, FigureKey } from '#shared/formats/types.ts';
import type { ReadingContext } from '#shared/method/readings.ts';
import { LEVELS, percentileInterval, reflectedInterval } from '#shared/stats/bootstrap-intervals.ts';
import { moments } from '#shared/stats/moments.ts';

/** A figure before it is read: what it is, how it is read from the maps, or why it cannot be. */
export interface FigurePlan {
  key: FigureKey;
  depth: number | null;
  gate: string | null;
  qubits: readonly number[];
  /** Why the figure is null; null where it can be read. */
  reason: string | null;
  extrapolated: boolean;
  firstOrderOnly: boolean;
  /** Distances take the reflected interval. */
  distance: boolean;
  read: (context: ReadingContext) => number;
}

export interface PlanFields {
  key: FigureKey;
  qubits: readonly number[];
  depth?: number;
  gate?: string;
  reason?: string | null;
  extrapolated?: boolean;
  firstOrderOnly?: boolean;
  distance?: boolean;
  read?: (context: ReadingContext) => number;
}

export function planFigure(fields: PlanFields): FigurePlan {
  return {
    key: fields.key, qubits: fields.qubits, depth: fields.depth ?? null, gate: fields.gate ?? null, reason: fields.reason ?? null,
    extrapolated: fields.extrapolated ?? false, firstOrderOnly: fields.firstOrderOnly ?? false, distance: fields.distance ?? false,
    read: fields.read ?? (() => NaN),
  };
}

/** The values of a figure: of the estimate, of the single pass, and of every replicate (NaN = dropped). */
export interface FigureValues {
  value: number;
  firstOrder: number;
  replicates: Float64Array;
}

/** The published figure. `withheld`: value without interval, because the counts do not fit the first-order model. */
export function writeFigure(plan: FigurePlan, values: FigureValues, withheld: boolean): Figure {
  const base = {
    key: plan.key, depth: plan.depth, gate: plan.gate, qubits: [...plan.qubits],
    extrapolated: plan.extrapolated, firstOrderOnly: plan.firstOrderOnly,
  };
  const kept = values.replicates.filter((v) => Number.isFinite(v)).sort();
  const reason = plan.reason ?? (Number.isFinite(values.value) ? null : 'not determined: the eigenvalues of the estimate could not be found');
  if (reason !== null) {
    return { ...base, value: null, standardError: null, intervals: null, firstOrder: null, determined: false, reason, replicates: 0 };
  }
  const bare = withheld || kept.length === 0;
  return {
    ...base,
    value: values.value,
    standardError: bare ? null : moments(kept).deviation,
    intervals: bare ? null : LEVELS.map((level) => (plan.distance ? reflectedInterval(kept, values.value, level) : percentileInterval(kept, level))),
    firstOrder: Number.isFinite(values.firstOrder) ? values.firstOrder : null,
    determined: true,
    reason: null,
    replicates: kept.length,
  };
}
