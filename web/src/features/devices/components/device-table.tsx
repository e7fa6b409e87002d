import { Link } from 'react-router-dom';
import type { DeviceSummary } from '#shared/contracts/devices.ts';
import { formatDate } from '#shared/domain/format-date.ts';
import { formatCount } from '#shared/domain/format.ts';
import { nameClass } from '#web/components/accession-link.tsx';
import { DataTable, type Column } from '#web/components/data-table.tsx';
import { modalityWords } from '#web/lib/modality-words.ts';

const columns: readonly Column<DeviceSummary>[] = [
  { id: 'name', header: 'Device', rowHeader: true, sortBy: (d) => d.name, cell: (d) => <Link className={nameClass(d.name)} to={`/devices/${encodeURIComponent(d.id)}`}>{d.name}</Link> },
  { id: 'provider', header: 'Provider', sortBy: (d) => d.provider.name, cell: (d) => d.provider.name },
  { id: 'modality', header: 'Modality', sortBy: (d) => modalityWords[d.modality], cell: (d) => modalityWords[d.modality] },
  { id: 'entries', header: 'Entries', numeric: true, sortBy: (d) => d.entries, cell: (d) => formatCount(d.entries) },
  { id: 'last', header: 'Last entry', nowrap: true, sortBy: (d) => d.lastEntryAt, cell: (d) => (d.lastEntryAt ? formatDate(d.lastEntryAt) : <span className="quiet">none yet</span>) },
];

export function DeviceTable({ devices }: { devices: readonly DeviceSummary[] }) {
  return <DataTable caption="Devices" captionHidden columns={columns} rows={devices} rowKey={(d) => d.id} initialSort={{ id: 'name', desc: false }} />;
}
