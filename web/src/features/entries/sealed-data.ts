import type { SealedPoint } from '#shared/contracts/entries.ts';
import { formatCount, formatNumber, formatSigned } from '#shared/domain/format.ts';
import { linearAxis, upright, type Axis } from '#web/charts/axis.ts';
import { cell, type ChartTable } from '#web/charts/chart-table.ts';

/** 97.5 % point of the standard normal: the grey range holds 95 % of points that only shot noise moves. */
const normal975 = 1.959963984540054;

export interface SealedDrawing {
  points: readonly { id: string; predicted: number; observed: number; left: number; outside: boolean; label: string }[];
  /** Shots the grey range is drawn for: the middle value where circuits differ. */
  shots: number;
  outside: number;
  share: Axis;
  residual: { x: Axis; y: Axis };
  /** Edge of the grey range in the stretched plot, upper then lower. */
  ellipse: { fill: string; upper: string; lower: string };
  /** Its highest point, per cent of the plot: its name stands there. */
  ellipseTop: number;
  table: ChartTable;
}

const digits = 4;
const noise = (p: number, shots: number): number => normal975 * Math.sqrt(Math.max(0, p * (1 - p)) / shots);

const middle = (values: readonly number[]): number => [...values].sort((a, b) => a - b)[Math.floor(values.length / 2)] ?? 1;

/** Predicted and observed share of one outcome of every sealed circuit, and what is left over beside what shot noise alone explains. */
export function sealedDrawing(sealed: readonly SealedPoint[]): SealedDrawing {
  const points = sealed.map(({ id, predicted, observed, shots, length }) => {
    const left = observed - predicted;
    return { id, predicted, observed, left, outside: Math.abs(left) > noise(Math.min(1, Math.max(0, predicted)), shots), label: `Circuit ${id}, length ${length}: predicted ${formatNumber(predicted, digits)}, observed ${formatNumber(observed, digits)}, difference ${formatSigned(left, digits)}` };
  });
  const shots = middle(sealed.map((p) => p.shots));
  const shares = points.flatMap((p) => [p.predicted, p.observed]);
  const share = linearAxis(shares, { include: [0, 1], pad: 0, count: 2 });
  const x = linearAxis(points.map((p) => p.predicted), { include: [0, 1], pad: 0, count: 4 });
  const widest = Math.max(noise(0.5, shots), ...points.map((p) => Math.abs(p.left)));
  const y = upright(linearAxis([-widest, widest], { count: 6, pad: 0.12, signed: true }));
  const steps = Array.from({ length: 81 }, (_, i) => i / 80);
  const edge = (sign: 1 | -1, ps: readonly number[]): string => ps.map((p, i) => `${i === 0 ? 'M' : 'L'}${x.at(p)} ${y.at(sign * noise(p, shots))}`).join('');
  const upper = edge(1, steps);
  const lower = edge(-1, steps);
  return {
    points,
    shots,
    outside: points.filter((p) => p.outside).length,
    share,
    residual: { x, y },
    ellipse: { fill: `${upper}${edge(-1, [...steps].reverse()).replace('M', 'L')}Z`, upper, lower },
    ellipseTop: y.at(noise(0.5, shots)),
    table: {
      caption: 'Sealed circuits, predicted and observed',
      columns: [{ head: 'Circuit', csv: 'circuit' }, { head: 'Length', csv: 'length', numeric: true }, { head: 'Shots', csv: 'shots', numeric: true }, { head: 'Outcome', csv: 'outcome' }, { head: 'Predicted', csv: 'predicted', numeric: true }, { head: 'Observed', csv: 'observed', numeric: true }, { head: 'Difference', csv: 'difference', numeric: true }],
      rows: sealed.map((p) => [cell(p.id), cell(String(p.length), p.length), cell(formatCount(p.shots), p.shots), cell(p.outcome, `outcome ${p.outcome}`), cell(formatNumber(p.predicted, digits), p.predicted), cell(formatNumber(p.observed, digits), p.observed), cell(formatSigned(p.observed - p.predicted, digits), p.observed - p.predicted)]),
    },
  };
}
