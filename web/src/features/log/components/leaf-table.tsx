import { Link } from 'react-router-dom';
import type { LogLeafItem } from '#shared/contracts/log.ts';
import { versionedAccessionOf } from '#shared/domain/ids.ts';
import { formatTime } from '#shared/domain/format-date.ts';
import { formatCount } from '#shared/domain/format.ts';
import { DataTable, type Column } from '#web/components/data-table.tsx';

const events: Readonly<Record<LogLeafItem['leaf']['event'], string>> = { frozen: 'Frozen', withdrawn: 'Withdrawn' };

const columns: readonly Column<LogLeafItem>[] = [
  { id: 'index', header: 'Leaf', numeric: true, rowHeader: true, sortBy: (l) => l.index, cell: (l) => formatCount(l.index) },
  { id: 'event', header: 'Event', cell: (l) => events[l.leaf.event] },
  { id: 'entry', header: 'Entry', nowrap: true, cell: (l) => <Link to={`/entries/${l.leaf.accession}/v/${l.leaf.version}`}>{versionedAccessionOf(l.leaf.accession, l.leaf.version)}</Link> },
  { id: 'at', header: 'Written', nowrap: true, sortBy: (l) => l.leaf.at, cell: (l) => formatTime(l.leaf.at) },
  { id: 'hash', header: 'Leaf hash', cell: (l) => <span className="hash">{l.hash.slice(0, 16)}…</span> },
  { id: 'proof', header: 'Proof', cell: (l) => <a href={`/api/v1/entries/${l.leaf.accession}/v/${l.leaf.version}/proof?event=${l.leaf.event}`}>JSON</a> },
];

/** Leaves of the log, the newest first. */
export function LeafTable({ leaves }: { leaves: readonly LogLeafItem[] }) {
  return <DataTable caption="The newest leaves of the log" captionHidden columns={columns} rows={leaves} rowKey={(l) => String(l.index)} initialSort={{ id: 'index', desc: true }} />;
}
