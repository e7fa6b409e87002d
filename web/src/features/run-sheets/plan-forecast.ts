import type { GateClassSummary } from '#shared/contracts/gate-classes.ts';
import { runSheetCreate } from '#shared/contracts/run-sheets.ts';
import type { PlannerCurve, PlannerPoint } from '#web/charts/planner-data.ts';
import { formatCount } from '#shared/domain/format.ts';
import { totalShots } from './sheet-size.ts';
import type { UnitFigure, UnitForecast } from './unit-forecast.ts';

/**
 * Sample sheets looked at for each number of circuits. Widths of single sheets of 200 circuits on one qubit lie anywhere within a
 * factor of two, so one would mislead; a root mean square over seven also keeps the search for the cheapest plan from following a
 * lucky draw. Larger sheets differ by a few per cent only, and take a second each: two.
 */
export const samplesOf = ({ registerSize }: Pick<GateClassSummary, 'registerSize'>): number => (registerSize === 1 ? 7 : 2);

/** Largest register that is forecast while the reader types: five qubits take two to four seconds a number of circuits. */
export const largestForecast = 5;

/** The depth at which plans are compared: that of the headline figure. */
export const headlineDepth = 16;

const headline = (unit: UnitForecast): UnitFigure['halfWidth'] => unit.figures.find((f) => f.key === 'retained-signal' && f.depth === headlineDepth)?.halfWidth ?? null;

/** Half-width of the headline figure with so many shots a circuit; null where it is not determined. */
export const headlineWidth = (unit: UnitForecast, shots: number): { typical: number; least: number; most: number } | null => {
  const width = headline(unit);
  const root = Math.sqrt(shots);
  return width && { typical: width.typical / root, least: width.least / root, most: width.most / root };
};

export interface CheapPlan extends PlannerPoint {
  circuits: number;
  shotsEach: number;
}

const mostShots = runSheetCreate.shape.shots.maxValue ?? 10_000_000;
const tens = (shots: number): number => Math.ceil(shots / 10) * 10;

/** Of the forecasts at hand, the plan of fewest shots in all whose headline half-width is no more than wanted, floors kept. */
export const cheapestPlan = (gateClass: GateClassSummary, units: Iterable<UnitForecast>, wanted: number): CheapPlan | null => {
  let best: CheapPlan | null = null;
  for (const unit of units) {
    const width = headline(unit);
    if (!width || unit.circuits < gateClass.floor.circuits) continue;
    const shotsEach = Math.max(gateClass.floor.shots, tens((width.typical / wanted) ** 2));
    if (shotsEach > mostShots) continue;
    const shots = totalShots(gateClass, unit.circuits, shotsEach);
    if (best === null || shots < best.shots) best = { circuits: unit.circuits, shotsEach, shots, halfWidth: width.typical / Math.sqrt(shotsEach) };
  }
  return best;
};

/** Numbers of circuits tried for the cheapest plan, as multiples of the class's floor; fewer where each takes seconds. */
const stepsOf = ({ registerSize }: GateClassSummary): readonly number[] => (registerSize === 1 ? [1, 1.5, 2, 3, 4, 6, 8] : [1, 1.5, 2, 3, 4]);

/** Numbers of circuits to forecast: the plan's own first, then its fourfold (for the drawing), then the ladder of the search. */
export const circuitsToForecast = (gateClass: GateClassSummary, circuits: number): number[] => {
  const ladder = stepsOf(gateClass).map((step) => Math.ceil(gateClass.floor.circuits * step));
  return [...new Set([circuits, ...companions(gateClass, circuits), ...ladder])];
};

/** Curves beside the plan's own: four times as many circuits, and the floor where it is well apart. */
const companions = ({ floor }: GateClassSummary, circuits: number): number[] => [4 * circuits, ...(circuits >= 2 * floor.circuits ? [floor.circuits] : [])];

const pointsOnCurve = 9;

/** Half-width against total shots, one curve a number of circuits, from the floor of shots to ten times the plan's cost. */
export const plannerCurves = (gateClass: GateClassSummary, units: ReadonlyMap<number, UnitForecast>, plan: { circuits: number; shots: number }): PlannerCurve[] => {
  const upper = 10 * totalShots(gateClass, plan.circuits, plan.shots);
  return [plan.circuits, ...companions(gateClass, plan.circuits)].flatMap((circuits): PlannerCurve[] => {
    const unit = units.get(circuits);
    const width = unit ? headline(unit) : null;
    const perShot = totalShots(gateClass, circuits, 1);
    const lower = perShot * gateClass.floor.shots;
    if (!width || lower >= upper) return [];
    const points = Array.from({ length: pointsOnCurve }, (_, i) => {
      const shots = lower * (upper / lower) ** (i / (pointsOnCurve - 1));
      return { shots: Math.round(shots), halfWidth: width.typical / Math.sqrt(shots / perShot) };
    });
    return [{ name: `${formatCount(circuits)} circuits`, points, main: circuits === plan.circuits }];
  });
};
