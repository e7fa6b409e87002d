import { Link } from 'react-router-dom';
import type { BoardSummary } from '#shared/contracts/boards.ts';
import { formatDate } from '#shared/domain/format-date.ts';
import { formatCount } from '#shared/domain/format.ts';
import { firstWords } from '../rank-words.ts';
import { RankStrip } from './rank-strip.tsx';
import { DataTable, type Column } from '#web/components/data-table.tsx';

const columns: readonly Column<BoardSummary>[] = [
  { id: 'class', header: 'Gate class', rowHeader: true, cell: ({ gateClass }) => <><Link className="name" to={`/boards/${gateClass.id}`}>{gateClass.title}</Link><span className="sub"><code>{gateClass.id}</code></span></> },
  { id: 'state', header: 'First place', cell: (board) => <FirstPlace board={board} /> },
  { id: 'eligible', header: 'Ranked', numeric: true, cell: (b) => formatCount(b.eligible) },
  { id: 'entries', header: 'Entries', numeric: true, cell: (b) => formatCount(b.entries) },
  { id: 'change', header: 'Last change', nowrap: true, cell: (b) => (b.lastChange ? formatDate(b.lastChange) : <span className="quiet">none yet</span>) },
];

function FirstPlace({ board: { gateClass, entries, eligible, first } }: { board: BoardSummary }) {
  if (first) return <span className="fp">{firstWords(first)}<RankStrip low={1} high={first.to} places={first.of} /></span>;
  if (!gateClass.ranked) return <>Predictions only; never ranked</>;
  if (entries === 0) return <>No entry yet</>;
  return <>{eligible === 1 ? 'One entry so far; ranks begin with two' : 'Opens with two entries on equal terms'}</>;
}

export function BoardListTable({ boards }: { boards: readonly BoardSummary[] }) {
  return <div className="boards"><DataTable caption="Boards, one for each gate class" captionHidden columns={columns} rows={boards} rowKey={(b) => b.gateClass.id} /></div>;
}
