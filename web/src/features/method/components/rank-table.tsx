import { formatCount } from '#shared/domain/format.ts';
import { DataTable, type Column } from '#web/components/data-table.tsx';
import { rankRows, type RankRow } from '../rank-table.ts';

const columns: readonly Column<RankRow>[] = [
  { id: 'gates', header: 'Gates', rowHeader: true, cell: (row) => row.gates },
  { id: 'columns', header: 'Columns', numeric: true, cell: (row) => formatCount(row.columns) },
  { id: 'gauge', header: 'Gauge', numeric: true, cell: (row) => formatCount(row.gauge) },
  { id: 'rank', header: 'Rank', numeric: true, cell: (row) => formatCount(row.rank) },
  { id: 'complete', header: 'Complete', cell: (row) => (row.complete ? 'yes' : 'no') },
  { id: 'ratio', header: 'Smallest over greatest singular value', numeric: true, cell: (row) => row.ratio },
];

/** What each gate set can tell about itself. */
export function RankTable() {
  return (
    <div className="ranktable">
      <DataTable tight columns={columns} rows={rankRows} rowKey={(row) => row.gates}
        caption={<>Rank of some gate sets <span className="quiet">(ratios of the designs that were drawn: 200 to 300 circuits of lengths 2 to 16 for one qubit, 1200 of lengths 4 to 16 for two)</span></>} />
    </div>
  );
}
