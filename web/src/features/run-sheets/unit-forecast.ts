import { sha256 } from '@noble/hashes/sha2.js';
import { utf8ToBytes } from '@noble/hashes/utils.js';
import type { FigureKey, GateClass } from '#shared/formats/types.ts';
import { forecast, type Forecast } from '#shared/method/forecast.ts';
import { Xoshiro256 } from '#shared/random/xoshiro256.ts';
import { sampleSheets } from './plan-forecast.ts';

/** One figure's half-width at one shot a circuit: divide by the square root of the shots. */
export interface UnitFigure {
  key: FigureKey;
  depth: number | null;
  gate: string | null;
  /** Root mean square over the sample sheets, with the narrowest and the widest of them; null = not determined by any. */
  halfWidth: { typical: number; least: number; most: number } | null;
}

/** What sheets of so many circuits promise, seen on a few sample sheets. */
export interface UnitForecast {
  circuits: number;
  rank: number;
  /** Median over the sample sheets. */
  conditionRatio: number;
  figures: UnitFigure[];
}

/** Two-sided 95 % quantile of the normal distribution. */
const z95 = 1.959963984540054;

type Drawing = Pick<GateClass, 'lengths' | 'drawing'>;

/** A sample sheet drawn as the registry draws: length uniform from the list, then each gate uniform from the drawing list. */
const sampleSheet = ({ lengths, drawing }: Drawing, circuits: number, seed: string): { gates: string[] }[] => {
  const stream = new Xoshiro256(sha256(utf8ToBytes(seed)));
  const pick = <T>(list: readonly T[]): T => list[Math.floor(stream.next() * list.length)] as T;
  return Array.from({ length: circuits }, () => ({ gates: Array.from({ length: pick(lengths) }, () => pick(drawing)) }));
};

const middle = (values: readonly number[]): number => {
  const sorted = [...values].sort((a, b) => a - b);
  const half = Math.floor(sorted.length / 2);
  return sorted.length % 2 === 1 ? sorted[half] ?? Number.NaN : ((sorted[half - 1] ?? Number.NaN) + (sorted[half] ?? Number.NaN)) / 2;
};

const spread = (errors: readonly (number | null)[]): UnitFigure['halfWidth'] => {
  const known = errors.filter((e) => e !== null).map((e) => e * z95);
  return known.length === 0 ? null : { typical: Math.sqrt(known.reduce((sum, w) => sum + w * w, 0) / known.length), least: Math.min(...known), most: Math.max(...known) };
};

/**
 * Half-widths for sheets of a one-qubit class, before any is drawn: `forecast` on a few sample sheets. Deterministic; the
 * sample seeds have nothing to do with the registry's. Cost: 7 forecasts of 20 to 120 ms each.
 */
export function unitForecast(gateClass: GateClass, circuits: number, readoutError: number): UnitForecast {
  const seen: Forecast[] = Array.from({ length: sampleSheets }, (_, i) =>
    forecast({ gates: gateClass.gates, qubits: [0], circuits: sampleSheet(gateClass, circuits, `plan ${gateClass.id} ${circuits} ${i}`), shots: 1, bench: gateClass.bench, readoutError }));
  const first = seen[0];
  if (!first) throw new RangeError('No sample sheet was drawn.');
  return {
    circuits,
    rank: Math.max(...seen.map((f) => f.rank)),
    conditionRatio: middle(seen.map((f) => f.conditionRatio)),
    figures: first.figures.map(({ key, depth, gate }, i) => ({ key, depth, gate, halfWidth: spread(seen.map((f) => f.figures[i]?.standardError ?? null)) })),
  };
}
