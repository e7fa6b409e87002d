import { useMemo, type ReactNode } from 'react';
import type { Board, BoardRow } from '#shared/contracts/boards.ts';
import { figureRange, figureValue, intervalAt } from '#shared/domain/figure-words.ts';
import { formatDate } from '#shared/domain/format-date.ts';
import { formatLevel } from '#shared/domain/format.ts';
import { rangeWords } from '../rank-words.ts';
import { AccessionLink } from '#web/components/accession-link.tsx';
import { DataTable, type Column } from '#web/components/data-table.tsx';
import { DemoTag } from '#web/components/demo.tsx';
import { modalityWords } from '#web/lib/modality-words.ts';

const intervalColumn = (level: number, decimals: number): Column<BoardRow> => ({
  id: `i${level}`, header: `${level * 100} % interval`, numeric: true, cell: (row) => figureRange(row.figure, level, decimals) ?? 'none',
  sortBy: (row) => { const found = intervalAt(row.figure, level); return found ? found.high - found.low : null; },
});

/** Sorts by the best rank, then by the worst. */
const rankColumn = (level: number): Column<BoardRow> => ({
  id: 'rank', header: 'Rank range', unit: `${formatLevel(level)} joint`, nowrap: true, cell: (row) => (row.rank ? rangeWords(row.rank) : 'none'),
  sortBy: (row) => (row.rank ? row.rank.low + row.rank.high / 1e6 : null),
});

/** The board as a plain table; every column can be sorted. An interval sorts by its width. */
export function BoardTable({ rows, ranking, decimals, caption }: Pick<Board, 'rows' | 'ranking'> & { decimals: number; caption: ReactNode }) {
  const columns = useMemo((): Column<BoardRow>[] => [
    ...(ranking ? [rankColumn(ranking.level)] : []),
    { id: 'device', header: 'Device', rowHeader: true, nowrap: true, cell: (row) => row.device.name, sortBy: (row) => row.device.name },
    { id: 'provider', header: 'Provider', cell: (row) => <>{row.device.provider.name}{row.demo ? <>; <DemoTag /></> : null}</>, sortBy: (row) => row.device.provider.name },
    { id: 'modality', header: 'Modality', nowrap: true, cell: (row) => modalityWords[row.device.modality], sortBy: (row) => modalityWords[row.device.modality] },
    { id: 'estimate', header: 'Estimate', numeric: true, cell: (row) => figureValue(row.figure, decimals), sortBy: (row) => row.figure.value },
    intervalColumn(0.5, decimals), intervalColumn(0.8, decimals), intervalColumn(0.95, decimals),
    { id: 'entry', header: 'Entry', nowrap: true, cell: (row) => <AccessionLink accession={row.accession} version={row.version} />, sortBy: (row) => row.accession },
    { id: 'run', header: 'Last circuit run', nowrap: true, cell: (row) => formatDate(row.lastCircuitAt), sortBy: (row) => row.lastCircuitAt },
  ], [decimals, ranking]);
  return <DataTable caption={caption} columns={columns} rows={rows} rowKey={(row) => row.accession} tight stack={false} region="The board as a table" />;
}
