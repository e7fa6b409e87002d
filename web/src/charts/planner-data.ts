import { decimalsFor, formatCount, formatNumber } from '#shared/domain/format.ts';
import { logAxis, upright, type Axis } from './axis.ts';
import { cell, type ChartTable } from './chart-table.ts';

export interface PlannerPoint {
  /** Shots of the whole sheet. */
  shots: number;
  /** Half-width of the 95 % interval. */
  halfWidth: number;
}

export interface PlannerCurve {
  /** Named at its right end: "200 circuits", "lengths 2 to 16". */
  name: string;
  points: readonly PlannerPoint[];
  /** The curve of the plan: drawn in full ink. */
  main?: boolean;
}

export interface PlannerDrawing {
  x: Axis;
  y: Axis;
  curves: readonly { name: string; main: boolean; path: string; end: { x: number; y: number } }[];
  table: ChartTable;
}

/** 230000 → "230 k", 1000000 → "1 M": short words for an axis. */
export const shortCount = (n: number): string => {
  if (n >= 1e6) return `${formatNumber(n / 1e6, n % 1e6 === 0 ? 0 : 1)} M`;
  if (n >= 1e4) return `${formatNumber(n / 1e3, n % 1e3 === 0 ? 0 : 1)} k`;
  return formatCount(n);
};

const halfWidthText = (halfWidth: number): string => `±${formatNumber(halfWidth, decimalsFor(halfWidth))}`;
const tickText = (halfWidth: number): string => `±${formatNumber(halfWidth, Math.max(0, -Math.floor(Math.log10(halfWidth) + 1e-9)))}`;

/** What certainty costs: half-width of an interval against shots, both logarithmic. */
export function plannerDrawing(curves: readonly PlannerCurve[], marks: readonly PlannerPoint[], wanted: number | null): PlannerDrawing {
  const all = [...curves.flatMap((c) => c.points), ...marks];
  const x = logAxis(all.map((p) => p.shots), shortCount);
  const widths = [...all.map((p) => p.halfWidth), ...(wanted !== null && wanted > 0 ? [wanted] : [])].filter((w) => w > 0);
  const y = upright(logAxis([Math.min(...widths) / 1.15, Math.max(...widths) * 1.1], tickText));
  return {
    x,
    y,
    curves: curves.map((curve) => {
      const placed = [...curve.points].sort((a, b) => a.shots - b.shots).map((p) => ({ x: x.at(p.shots), y: y.at(p.halfWidth) }));
      return { name: curve.name, main: curve.main ?? false, path: placed.map((p, i) => `${i === 0 ? 'M' : 'L'}${p.x} ${p.y}`).join(''), end: placed[placed.length - 1] ?? { x: 0, y: 0 } };
    }),
    table: {
      caption: 'Half-width of the 95 % interval against shots',
      columns: [{ head: 'Plan', csv: 'plan' }, { head: 'Shots', csv: 'shots', numeric: true }, { head: 'Half-width', csv: 'half_width_95', numeric: true }],
      rows: curves.flatMap((curve) => curve.points.map((p) => [cell(curve.name), cell(formatCount(p.shots), p.shots), cell(halfWidthText(p.halfWidth), p.halfWidth)])),
    },
  };
}
