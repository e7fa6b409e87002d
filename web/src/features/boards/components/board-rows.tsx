import { useMemo } from 'react';
import type { Board } from '#shared/contracts/boards.ts';
import { formatLevel } from '#shared/domain/format.ts';
import { AxisStrip } from '#web/charts/axis-strip.tsx';
import { tableRoles as r } from '#web/components/table-roles.ts';
import type { BoardDrawingData } from '../board-data.ts';
import { boardParts, rankedRows, tieWords } from '../board-parts.ts';
import { BoardRowLine } from './board-row-line.tsx';

/** The board drawn: one row an entry, one axis for all rows, cut into parts that can be told apart. */
export function BoardRows({ board, data, caption, quiet }: { board: Pick<Board, 'rows' | 'ranking'>; data: BoardDrawingData; caption: string; quiet: string }) {
  const { rows, ranking } = board;
  const ranked = useMemo(() => rankedRows(rows), [rows]);
  const parts = useMemo(() => (ranked ? boardParts(ranked) : []), [ranked]);
  return (
    <table className={ranked ? 'board ranked' : 'board'} {...r.table}>
      <caption>{caption} <span className="quiet">{quiet}</span></caption>
      <thead {...r.group}>
        <tr {...r.row}>
          {ranked && ranking ? <><th {...r.columnHead} scope="col" className="c-tie"><span className="unseen">Ties</span></th><th {...r.columnHead} scope="col" className="c-rank">Rank range<span className="unit">{formatLevel(ranking.level)} joint</span></th></> : null}
          <th {...r.columnHead} scope="col" className="c-name">Device</th>
          <th {...r.columnHead} scope="col" className="c-plot"><span className="unseen">Drawn interval</span><AxisStrip axis={data.axis} side="top" /></th>
          <th {...r.columnHead} scope="col" className="c-val">Estimate<span className="unit">95 % interval</span></th>
          <th {...r.columnHead} scope="col" className="c-entry">Entry<span className="unit">last circuit run</span></th>
          <th {...r.columnHead} scope="col" className="c-own">Yours</th>
        </tr>
      </thead>
      {ranked && ranking ? parts.map((part) => (
        <tbody key={part.key} {...r.group}>
          <tr {...r.row} className="grp"><th {...r.rowHead} scope="rowgroup" colSpan={7}><b>{part.title}</b> <span>{part.sentence}</span></th></tr>
          {part.rows.map((row, at) => <BoardRowLine key={row.accession} row={row} data={data} place={{ at, brackets: part.brackets, ties: tieWords(row, ranked), places: ranking.entries }} />)}
        </tbody>
      )) : <tbody {...r.group}>{rows.map((row) => <BoardRowLine key={row.accession} row={row} data={data} />)}</tbody>}
      <tfoot {...r.group}><tr {...r.row}><td {...r.cell} colSpan={ranked ? 3 : 1} /><td {...r.cell} className="c-plot"><AxisStrip axis={data.axis} side="bottom" /></td><td {...r.cell} colSpan={3} /></tr></tfoot>
    </table>
  );
}
