import type { FigureKey, Interval } from '#shared/formats/types.ts';
import { decimalsFor, formatNumber, formatRange, formatValue, type Scale } from './format.ts';

/** What the words and digits of a figure need; `Figure` of the result file and of the responses both fit. */
export interface FigureLike {
  key: FigureKey;
  depth: number | null;
  gate: string | null;
  qubits: readonly number[];
  value: number | null;
  standardError: number | null;
  intervals: readonly Interval[] | null;
}

const names: Readonly<Record<FigureKey, string>> = {
  'retained-signal': 'Retained signal',
  'output-error': 'Output error',
  'error-per-gate': 'Error per gate',
  'gate-loss': 'Gate loss',
  'angle-error': 'Angle error',
  'readout-loss': 'Readout loss',
  'prediction-error': 'Prediction error',
};

/** "Retained signal, depth 16"; "Gate loss, rx(π/2)" when the gate's words are given. */
export const figureName = (figure: Pick<FigureLike, 'key' | 'depth' | 'gate'>, gateWords?: string): string => {
  const name = names[figure.key];
  if (figure.depth !== null) return `${name}, depth ${figure.depth}`;
  if (figure.gate !== null) return `${name}, ${gateWords ?? figure.gate}`;
  return name;
};

export const intervalAt = (figure: Pick<FigureLike, 'intervals'>, level: number): Interval | null => figure.intervals?.find((i) => Math.abs(i.level - level) < 1e-9) ?? null;

const equalWhenRounded = (a: number, b: number, decimals: number): boolean => a !== b && formatNumber(a, decimals) === formatNumber(b, decimals);

/** Decimals of one figure: two digits of its standard error, and more where rounding would make the ends of its 95 % interval equal. */
export const figureDecimals = (figure: Pick<FigureLike, 'standardError' | 'intervals'>): number => {
  const wide = intervalAt(figure, 0.95);
  const width = wide ? wide.high - wide.low : 0;
  let decimals = decimalsFor(figure.standardError ?? width / 3.92);
  while (wide && decimals < 15 && equalWhenRounded(wide.low, wide.high, decimals)) decimals += 1;
  return decimals;
};

/** One number of decimals for a column: the most that any of its figures asks for. */
export const columnDecimals = (figures: readonly Pick<FigureLike, 'standardError' | 'intervals' | 'value'>[]): number =>
  figures.reduce((most, figure) => (figure.value === null ? most : Math.max(most, figureDecimals(figure))), 0);

/** "0.9695", or "Not determined" where there is no value. */
export const figureValue = (figure: FigureLike, decimals = figureDecimals(figure), scale: Scale = 'plain'): string => (figure.value === null ? 'Not determined' : formatValue(figure.value, decimals, scale));

/** "0.9658 to 0.9732" at a level, or null where there is no such interval. */
export const figureRange = (figure: FigureLike, level = 0.95, decimals = figureDecimals(figure), scale: Scale = 'plain'): string | null => {
  const interval = intervalAt(figure, level);
  return interval ? formatRange(interval.low, interval.high, decimals, scale) : null;
};
