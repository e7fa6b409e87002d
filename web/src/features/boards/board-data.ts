import type { Board, BoardRow } from '#shared/contracts/boards.ts';
import { columnDecimals, figureRange, figureValue, intervalAt } from '#shared/domain/figure-words.ts';
import { formatDate } from '#shared/domain/format-date.ts';
import { versionedAccessionOf } from '#shared/domain/ids.ts';
import { linearAxis, type Axis } from '#web/charts/axis.ts';
import { cell, type ChartCell, type ChartTable } from '#web/charts/chart-table.ts';
import { beamExtent } from '#web/charts/beam-geometry.ts';
import { rangeWords } from './rank-words.ts';
import { modalityWords } from '#web/lib/modality-words.ts';

export interface BoardDrawingData {
  axis: Axis;
  /** One number of decimals for the whole column. */
  decimals: number;
  table: ChartTable;
}

const levels = [0.5, 0.8, 0.95] as const;

/** One axis for all rows, one number of digits, and the same numbers as a table. */
export function boardData({ rows, ranking }: Pick<Board, 'rows' | 'ranking'>, caption: string): BoardDrawingData {
  const figures = rows.map((row) => row.figure);
  const decimals = columnDecimals(figures);
  const intervalCells = (row: BoardRow): ChartCell[] =>
    levels.flatMap((level) => {
      const found = intervalAt(row.figure, level);
      return [cell(figureRange(row.figure, level, decimals) ?? '', found?.low ?? null), cell('', found?.high ?? null)];
    });
  return {
    axis: linearAxis(beamExtent(figures), { count: 6, pad: 0.05 }),
    decimals,
    table: {
      caption,
      columns: [
        { head: 'Rank range', csv: 'rank_low', numeric: true }, { head: '', csv: 'rank_high', numeric: true }, { head: '', csv: 'rank_level', numeric: true },
        { head: 'Device', csv: 'device' }, { head: 'Provider', csv: 'provider' }, { head: 'Modality', csv: 'modality' },
        { head: 'Estimate', csv: 'estimate', numeric: true }, { head: 'Standard error', csv: 'standard_error', numeric: true },
        ...levels.flatMap((level) => [{ head: `${level * 100} %`, csv: `low_${level * 100}`, numeric: true }, { head: '', csv: `high_${level * 100}`, numeric: true }]),
        { head: 'Entry', csv: 'entry' }, { head: 'Method', csv: 'method' }, { head: 'Last circuit run', csv: 'last_circuit_run' }, { head: 'Demonstration', csv: 'demonstration' },
      ],
      rows: rows.map((row) => [
        cell(row.rank ? rangeWords(row.rank) : 'none', row.rank?.low ?? null), cell('', row.rank?.high ?? null), cell('', row.rank ? (ranking?.level ?? null) : null),
        cell(row.device.name), cell(row.device.provider.name), cell(modalityWords[row.device.modality]),
        cell(figureValue(row.figure, decimals), row.figure.value), cell('', row.figure.standardError),
        ...intervalCells(row),
        cell(versionedAccessionOf(row.accession, row.version)), cell(row.method), cell(formatDate(row.lastCircuitAt)), cell(row.demo ? 'yes' : 'no'),
      ]),
    },
  };
}
