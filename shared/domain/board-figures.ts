import type { BoardFigure } from '#shared/contracts/boards.ts';
import type { Figure, FigureKey } from '#shared/formats/types.ts';

export interface Reading {
  key: FigureKey;
  depth: number | null;
  /** Which way is better. */
  better: 'higher' | 'lower';
}

/** The figures a board can be read by. */
export const boardReadings: Readonly<Record<BoardFigure, Reading>> = {
  'retained-signal-4': { key: 'retained-signal', depth: 4, better: 'higher' },
  'retained-signal-16': { key: 'retained-signal', depth: 16, better: 'higher' },
  'retained-signal-64': { key: 'retained-signal', depth: 64, better: 'higher' },
  'output-error-16': { key: 'output-error', depth: 16, better: 'lower' },
  'error-per-gate': { key: 'error-per-gate', depth: null, better: 'lower' },
  'readout-loss': { key: 'readout-loss', depth: null, better: 'lower' },
};

/** The one figure of that kind that speaks of the whole register; null where there is none, as for error per gate in a chained register. */
export const registerFigure = (figures: readonly Figure[], reading: { key: FigureKey; depth: number | null }, registerSize: number): Figure | null =>
  figures.find((f) => f.key === reading.key && f.depth === reading.depth && f.gate === null && f.qubits.length === registerSize) ?? null;

/** The headline: retained signal at depth 16. */
export const headlineOf = (figures: readonly Figure[], registerSize: number): Figure | null => registerFigure(figures, boardReadings['retained-signal-16'], registerSize);

/** Sorts by estimate, the better first; rows without a value come last. */
export const byEstimate = (better: Reading['better']) => (a: number | null, b: number | null): number => {
  if (a === null || b === null) return a === b ? 0 : a === null ? 1 : -1;
  return better === 'higher' ? b - a : a - b;
};
