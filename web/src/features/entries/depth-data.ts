import { area, curveMonotoneX, line } from 'd3';
import type { Entry } from '#shared/contracts/entries.ts';
import { columnDecimals, figureRange, figureValue, intervalAt } from '#shared/domain/figure-words.ts';
import { beamExtent } from '#web/charts/beam-geometry.ts';
import { linearAxis, placedAxis, upright, type Axis } from '#web/charts/axis.ts';
import { cell, type ChartTable } from '#web/charts/chart-table.ts';

type EntryFigure = Entry['figures'][number];
const levels = [0.95, 0.8, 0.5] as const;

export interface DepthDrawing {
  points: readonly { depth: number; x: number; y: number; extrapolated: boolean; headline: boolean; text: string; label: string }[];
  bands: readonly { level: number; path: string; edges: readonly string[] }[];
  line: string;
  /** Where the method begins to extrapolate, per cent of the plot; null where nothing is extrapolated. */
  farFrom: number | null;
  x: Axis;
  y: Axis;
  table: ChartTable;
}

/** Depths on a scale that doubles: 0, 1, 4, 8 … lie at log₂(1 + depth). */
const place = (depth: number): number => Math.log2(1 + depth);

const byDepth = (figures: readonly EntryFigure[], key: EntryFigure['key']): EntryFigure[] =>
  figures.filter((f) => f.key === key && f.depth !== null && f.value !== null).sort((a, b) => (a.depth ?? 0) - (b.depth ?? 0));

/** Retained signal against depth with its three bands. Everything drawn is in the table, digit for digit. */
export function depthDrawing(figures: readonly EntryFigure[], longestCircuit: number): DepthDrawing | null {
  const found = byDepth(figures, 'retained-signal');
  if (found.length < 2) return null;
  const output = new Map(byDepth(figures, 'output-error').map((f) => [f.depth, f]));
  const decimals = columnDecimals(found);
  const outputDecimals = columnDecimals([...output.values()]);
  const x = placedAxis(found.map((f) => f.depth ?? 0), place, String);
  const y = upright(linearAxis(beamExtent(found), { count: 6, pad: 0.04 }));
  const at = found.map((f) => x.at(f.depth ?? 0));
  const pathOf = line<number>((_, i) => at[i] ?? 0, (value) => y.at(value)).curve(curveMonotoneX);
  const bands = levels.flatMap((level) => {
    const ends = found.map((f) => intervalAt(f, level));
    if (!ends.every((i) => i !== null)) return [];
    const shape = area<{ low: number; high: number }>().x((_, i) => at[i] ?? 0).y0((i) => y.at(i.low)).y1((i) => y.at(i.high)).curve(curveMonotoneX);
    return [{ level, path: shape(ends) ?? '', edges: level === 0.95 ? [pathOf(ends.map((i) => i.low)) ?? '', pathOf(ends.map((i) => i.high)) ?? ''] : [] }];
  });
  const last = Math.max(...found.map((f) => f.depth ?? 0));
  return {
    points: found.map((f, i) => {
      const text = figureValue(f, decimals);
      const range = figureRange(f, 0.95, decimals);
      return { depth: f.depth ?? 0, x: at[i] ?? 0, y: y.at(f.value ?? 0), extrapolated: f.extrapolated, headline: f.depth === 16, text, label: `Depth ${f.depth}: ${text}, ${range ? `95 % interval ${range}` : 'no interval'}${f.extrapolated ? ', extrapolated' : ''}` };
    }),
    bands,
    line: pathOf(found.map((f) => f.value ?? 0)) ?? '',
    farFrom: 2 * longestCircuit < last ? x.at(2 * longestCircuit) : null,
    x,
    y,
    table: {
      caption: 'Retained signal and output error by depth',
      columns: [
        { head: 'Depth', csv: 'depth', numeric: true }, { head: 'Retained signal', csv: 'retained_signal', numeric: true }, { head: '95 % interval', csv: 'retained_signal_interval_95', numeric: true },
        { head: 'Output error', csv: 'output_error', numeric: true }, { head: '95 % interval', csv: 'output_error_interval_95', numeric: true }, { head: '', csv: 'extrapolated' },
      ],
      rows: found.map((f) => {
        const other = output.get(f.depth);
        return [
          cell(String(f.depth), f.depth), cell(figureValue(f, decimals), f.value), cell(figureRange(f, 0.95, decimals) ?? 'none', rangeRaw(f)),
          cell(other ? figureValue(other, outputDecimals) : 'not determined', other?.value ?? null), cell((other && figureRange(other, 0.95, outputDecimals)) ?? 'none', other ? rangeRaw(other) : null),
          cell(f.extrapolated ? 'extrapolated' : '', f.extrapolated ? 'yes' : 'no'),
        ];
      }),
    },
  };
}

/** Both ends in one CSV field, at full precision: "0.9658 to 0.9732". */
const rangeRaw = (f: EntryFigure): string | null => {
  const wide = intervalAt(f, 0.95);
  return wide ? `${wide.low} to ${wide.high}` : null;
};
