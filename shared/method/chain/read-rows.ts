import { ESTIMATE, FIRST, REPLICATES } from '#shared/method/chain/map-table.ts';
import type { FigurePlan, FigureValues } from '#shared/method/figure-plan.ts';
import { applyParameters, emptyMaps } from '#shared/method/parameters.ts';
import type { Passes } from '#shared/method/passes.ts';
import type { PatchProblem } from '#shared/method/patch-problem.ts';
import type { ReadingContext } from '#shared/method/readings.ts';
import type { Replicates } from '#shared/method/replicates.ts';

/** A figure and what was read of it. */
export interface ReadFigure {
  plan: FigurePlan;
  values: FigureValues;
}

/**
 * Reads every open plan at the estimate, the single pass and each replicate; what is left unread stays NaN.
 * @param count length of every figure's replicates @param read how many of them are read
 * @param contextOf what the figures of a row are read from; null = the row is not finite
 */
export function readRows(plans: readonly FigurePlan[], count: number, read: number, contextOf: (row: number) => ReadingContext | null, onReplicate?: (b: number, context: ReadingContext) => void): ReadFigure[] {
  const out = plans.map((plan): ReadFigure => ({ plan, values: { value: NaN, firstOrder: NaN, replicates: new Float64Array(count).fill(NaN) } }));
  const open = out.filter(({ plan }) => plan.reason === null);
  if (open.length === 0) return out;
  const take = (row: number, put: (figure: ReadFigure, value: number) => void): ReadingContext | null => {
    const context = contextOf(row);
    if (context) for (const figure of open) put(figure, figure.plan.read(context));
    return context;
  };
  take(ESTIMATE, ({ values }, v) => (values.value = v));
  take(FIRST, ({ values }, v) => (values.firstOrder = v));
  for (let b = 0; b < read; b++) {
    const context = take(REPLICATES + b, ({ values }, v) => (values.replicates[b] = v));
    if (context) onReplicate?.(b, context);
  }
  return out;
}

const NOTHING = new Float64Array(0);

/** Contexts of one patch: its maps, and no probabilities. */
export function patchContext(problem: PatchProblem, passes: Passes, replicates: Replicates): (row: number) => ReadingContext | null {
  const { set, layout } = problem;
  const maps = emptyMaps(set);
  const { columns } = layout;
  return (row) => {
    const b = row - REPLICATES;
    if (b >= 0 && !replicates.finite[b]) return null;
    const e = row === ESTIMATE ? passes.e : row === FIRST ? passes.first : replicates.parameters.subarray(b * columns, (b + 1) * columns);
    applyParameters(set, layout, e, maps);
    return { maps, probabilities: NOTHING };
  };
}
