import { timeFormat } from 'd3';
import type { LogGrowth } from '#shared/contracts/log.ts';
import { formatCount, plural } from '#shared/domain/format.ts';
import { linearAxis, upright, type Axis } from '#web/charts/axis.ts';
import { cell, type ChartTable } from '#web/charts/chart-table.ts';

export interface GrowthDrawing {
  points: readonly { key: string; x: number; y: number; label: string }[];
  /** Steps: the size holds until the next month adds to it. */
  path: string;
  x: Axis;
  y: Axis;
  table: ChartTable;
}

const yearOf = timeFormat('%Y');
/** Months since the year 0, so that equal months are equally far apart. */
const placeOf = (month: string): number => Number(month.slice(0, 4)) * 12 + Number(month.slice(5, 7)) - 1;

/** Years on the lower axis, at their first month. */
const timeAxis = (places: readonly number[]): Axis => {
  const low = Math.min(...places);
  const high = Math.max(...places, low + 1);
  const at = (place: number): number => Math.round((4 + ((place - low) / (high - low)) * 92) * 1000) / 1000;
  const years = Array.from({ length: Math.floor(high / 12) - Math.ceil(low / 12) + 1 }, (_, i) => Math.ceil(low / 12) + i);
  return { at, domain: [low, high], ticks: years.map((year) => ({ value: year * 12, at: at(year * 12), label: yearOf(new Date(year, 0)) })) };
};

/** Size of the log at the end of each month in which it grew; null before its second month. */
export function growthDrawing({ months }: LogGrowth): GrowthDrawing | null {
  if (months.length < 2) return null;
  const x = timeAxis(months.map((m) => placeOf(m.month)));
  const y = upright(linearAxis(months.map((m) => m.size), { include: [0], pad: 0.04, count: 4 }));
  const points = months.map((m) => ({ key: m.month, x: x.at(placeOf(m.month)), y: y.at(m.size), label: `${m.month}: ${formatCount(m.size)} leaves, ${formatCount(m.leaves)} ${plural(m.leaves, 'of them', 'of them')} new` }));
  const path = points.map((p, i) => (i === 0 ? `M${p.x},${p.y}` : `H${p.x}V${p.y}`)).join('');
  return {
    points, path, x, y,
    table: {
      caption: 'Leaves of the log by month',
      columns: [{ head: 'Month', csv: 'month' }, { head: 'New leaves', csv: 'new_leaves', numeric: true }, { head: 'Leaves at its end', csv: 'leaves', numeric: true }],
      rows: months.map((m) => [cell(m.month), cell(formatCount(m.leaves), m.leaves), cell(formatCount(m.size), m.size)]),
    },
  };
}
