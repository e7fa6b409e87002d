import { Link } from 'react-router-dom';
import type { Board } from '#shared/contracts/boards.ts';
import { formatTime } from '#shared/domain/format-date.ts';
import { capitalise, countInWords, formatCount, formatLevel, plural } from '#shared/domain/format.ts';
import { Facts } from '#web/components/facts.tsx';
import { certainWords, firstWords, leadOf } from '../rank-words.ts';
import { PageHead } from '#web/components/page-head.tsx';

const openingOf = (board: Board): string => {
  const n = board.rows.length;
  if (!board.gateClass.ranked) return 'The gates of this class do not determine every figure. Its entries are public, but never ranked.';
  if (n === 0) return 'No entry taken on equal terms matches here yet.';
  if (!board.ranking) return `${capitalise(countInWords(n))} ${plural(n, 'entry was', 'entries were')} taken on equal terms. ${n === 1 ? 'Ranks begin with the second.' : 'Nothing is ranked here: the order is that of the estimates.'}`;
  const m = board.ranking.entries;
  if (n < m) return `${capitalise(countInWords(m))} entries are ranked; the filters show ${countInWords(n)} of them. A rank is a place among all ${countInWords(m)}.`;
  const ranges = board.rows.flatMap(({ rank }) => (rank ? [rank] : []));
  const first = firstWords(leadOf(ranges));
  return `${capitalise(countInWords(m))} entries are ranked. ${first}${/share/.test(first) ? ' and cannot be told apart' : ''}. ${certainWords(ranges)}`;
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
        ...(board.ranking ? [{ term: 'Ranks', value: <Link to="/method#ranks">{formatLevel(board.ranking.level)} joint</Link> }] : []),
        { term: 'Read at', value: <span className="nowrap">{formatTime(board.readAt)}</span> },
      ]} />
    </PageHead>
  );
}
