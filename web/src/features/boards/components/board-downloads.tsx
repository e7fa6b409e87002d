import type { Board } from '#shared/contracts/boards.ts';
import { toCsv } from '#web/charts/chart-table.ts';
import { standaloneSvg } from '#web/charts/standalone-svg.ts';
import { drawApart } from '#web/lib/draw-apart.tsx';
import { saveFile } from '#web/lib/save-file.ts';
import { boardJsonAddress, type BoardView } from '../api/boards.ts';
import type { BoardDrawingData } from '../board-data.ts';
import { boardFigureWords } from '../board-view.ts';
import { BoardDrawing } from './board-drawing.tsx';

export function BoardDownloads({ board, data, view }: { board: Board; data: BoardDrawingData; view: BoardView }) {
  const stem = `evenbeam-${board.gateClass.id.replaceAll('/', '-')}-${board.figure}`;
  const title = `${board.gateClass.title}: ${boardFigureWords[board.figure].toLowerCase()}, read ${board.readAt.slice(0, 10)}`;
  const saveDrawing = (): void => { drawApart(<BoardDrawing rows={board.rows} data={data} />, (svg) => saveFile(`${stem}.svg`, 'image/svg+xml', standaloneSvg(svg, title, { top: 44, right: 24, bottom: 20, left: 24 }))); };
  return (
    <p className="takeaway noprint">
      <button type="button" className="linkish" onClick={saveDrawing}>Download the drawing (SVG)</button>
      <button type="button" className="linkish" onClick={() => saveFile(`${stem}.csv`, 'text/csv', toCsv(data.table))}>Numbers (CSV)</button>
      <a href={boardJsonAddress(board.gateClass.id, view)} download={`${stem}.json`}>Numbers (JSON)</a>
    </p>
  );
}
