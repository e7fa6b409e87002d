import { useMemo } from 'react';
import { useSearchParams } from 'react-router-dom';
import type { Board } from '#shared/contracts/boards.ts';
import { Button, ButtonLink } from '#web/components/button.tsx';
import { EmptyState } from '#web/components/blank-state.tsx';
import { DemoNote } from '#web/components/demo.tsx';
import { boardData } from '../board-data.ts';
import { boardFigureWords, isFiltered, readingWords, viewOf } from '../board-view.ts';
import { BoardDownloads } from './board-downloads.tsx';
import { BoardRows } from './board-rows.tsx';
import { BoardTable } from './board-table.tsx';
import { KeyLine } from './key-line.tsx';

/** The board itself, drawn or as a table, or the reason why it is empty. */
export function BoardBody({ board }: { board: Board }) {
  const [search, setSearch] = useSearchParams();
  const view = viewOf(search);
  const caption = `${boardFigureWords[board.figure]}, ${board.ranking ? 'all ranked entries' : 'all entries taken on equal terms'}`;
  const data = useMemo(() => boardData(board, caption), [board, caption]);
  if (board.rows.length === 0) {
    if (isFiltered(view)) {
      const clear = (): void => setSearch((before) => { const next = new URLSearchParams(before); for (const field of ['modality', 'provider', 'within']) next.delete(field); return next; });
      return <EmptyState level={2} title="Nothing matches these filters" act={<Button onClick={clear}>Take all entries</Button>}>No entry on this board matches all filters at once.</EmptyState>;
    }
    return board.gateClass.ranked
      ? <EmptyState level={2} title="No entry in this gate class yet" act={<ButtonLink to="/method#ranks">How figures are made</ButtonLink>}>A board opens with its first two entries taken on equal terms.</EmptyState>
      : <EmptyState level={2} title="This class is never ranked">Its gates do not determine every figure, so its entries give predictions only. They are named below.</EmptyState>;
  }
  const demo = board.rows.filter((row) => row.demo).length;
  const drawn = search.get('view') !== 'table';
  return (
    <div className="flow">
      {demo > 0 ? <DemoNote some={demo < board.rows.length} /> : null}
      {drawn ? <KeyLine ranked={board.ranking !== null} /> : null}
      {drawn ? <BoardRows board={board} data={data} caption={caption} quiet={readingWords(board.figure)} /> : <BoardTable rows={board.rows} ranking={board.ranking} decimals={data.decimals} caption={<>{caption} <span className="quiet">{readingWords(board.figure)}</span></>} />}
      <BoardDownloads board={board} data={data} view={view} />
    </div>
  );
}
