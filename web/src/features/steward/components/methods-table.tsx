import type { MethodView } from '#shared/contracts/methods.ts';
import { formatDate } from '#shared/domain/format-date.ts';
import { formatCount } from '#shared/domain/format.ts';
import { DataTable, type Column } from '#web/components/data-table.tsx';

const columns: readonly Column<MethodView>[] = [
  { id: 'id', header: 'Version', rowHeader: true, nowrap: true, cell: (m) => m.id },
  { id: 'status', header: 'Standing', cell: (m) => (m.status === 'official' ? 'Official' : 'Draft') },
  { id: 'passes', header: 'Passes', numeric: true, cell: (m) => m.passes },
  { id: 'since', header: 'Since', nowrap: true, cell: (m) => formatDate(m.since) },
  { id: 'results', header: 'Public results', numeric: true, cell: (m) => formatCount(m.results) },
  { id: 'changes', header: 'What it does', cell: (m) => m.changes },
];

export function MethodsTable({ methods }: { methods: readonly MethodView[] }) {
  return <DataTable caption="Method versions" captionHidden columns={columns} rows={methods} rowKey={(m) => m.id} />;
}
