import { Link } from 'react-router-dom';
import type { Board } from '#shared/contracts/boards.ts';
import { formatTime } from '#shared/domain/format-date.ts';
import { capitalise, countInWords, formatCount, plural } from '#shared/domain/format.ts';
import { Facts } from '#web/components/facts.tsx';
import { PageHead } from '#web/components/page-head.tsx';

const openingOf = (board: Board): string => {
  const n = board.rows.length;
  if (!board.gateClass.ranked) return 'The gates of this class do not determine every figure. Its entries are public, but never ranked.';
  if (n === 0) return 'No entry taken on equal terms matches here yet.';
  const are = `${capitalise(countInWords(n))} ${plural(n, 'entry was', 'entries were')} taken on equal terms.`;
  return n === 1 ? are : `${are} They stand in the order of their estimates, the better first; the order carries no ranks yet.`;
};

export function BoardHead({ board }: { board: Board }) {
  const { gateClass } = board;
  return (
    <PageHead above={<><Link to="/boards">Boards</Link>, gate class <code>{gateClass.id}</code></>} title={gateClass.title} opening={openingOf(board)}>
      <Facts items={[
        { term: 'Gates', value: gateClass.gates.map((g) => (gateClass.registerSize > 1 ? `${g.words} on ${g.targets.join(', ')}` : g.words)).join(gateClass.registerSize > 1 ? '; ' : ', ') },
        { term: 'Register', value: `${gateClass.registerSize} ${plural(gateClass.registerSize, 'qubit')}` },
        { term: 'Floor', value: `${formatCount(gateClass.floor.circuits)} circuits, ${formatCount(gateClass.floor.shots)} shots each` },
        { term: 'Method', value: <Link to="/method">{board.method}</Link> },
        { term: 'Read at', value: <span className="nowrap">{formatTime(board.readAt)}</span> },
      ]} />
    </PageHead>
  );
}
