import { useQuery } from '@tanstack/react-query';
import type { Board } from '#shared/contracts/boards.ts';
import { asApiError } from '#web/lib/api-error.ts';
import { useOwnSelection } from '#web/lib/own-selection.ts';
import { differenceQuery } from '../api/boards.ts';
import { differenceWords } from '../difference-words.ts';

/** The difference of two entries of the board, with its own interval. */
function Difference({ board, a, b }: { board: Board; a: string; b: string }) {
  const query = useQuery(differenceQuery(board.gateClass.id, board.figure, a, b));
  if (query.isError) return <p className="quiet">The two could not be compared. {asApiError(query.error).message}</p>;
  return <p aria-live="polite">{query.data ? differenceWords(query.data) : <span className="quiet">Comparing the two</span>}</p>;
}

/** What the reader has marked as their own, at the foot of the window; where it is two ranked entries of this board, how they differ. */
export function OwnTray({ board }: { board: Board | undefined }) {
  const own = useOwnSelection();
  if (own.list.length === 0) return null;
  const [a, b, more] = board?.rows.filter((row) => row.rank !== null && own.has(row.accession)) ?? [];
  return (
    <div className="tray noprint" role="region" aria-label="Your selection">
      <div className="wrap">
        <div className="traywords">
          <p><b>Yours:</b> {own.list.map((entry, i) => <span key={entry.accession}>{i > 0 ? ', ' : ''}<span className="nowrap">{entry.name}</span></span>)}</p>
          {board && a && b && !more ? <Difference board={board} a={a.accession} b={b.accession} /> : null}
        </div>
        <button type="button" className="btn plain" onClick={own.clear}>Clear</button>
      </div>
    </div>
  );
}
