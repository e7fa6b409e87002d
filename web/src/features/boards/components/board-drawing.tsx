import type { BoardRow } from '#shared/contracts/boards.ts';
import { figureRange, figureValue } from '#shared/domain/figure-words.ts';
import { Beam } from '#web/charts/beam.tsx';
import type { BoardDrawingData } from '../board-data.ts';
import { boardParts, rankedRows, type BoardPart } from '../board-parts.ts';
import { rangeWords } from '../rank-words.ts';

const rowHeight = 36;
const plotWidth = 420;
/** Room for brackets and rank ranges. */
const rankWidth = 96;

/** The board as one drawing, for the SVG file: rank ranges with their brackets, names, beams on the common axis, numbers. */
export function BoardDrawing({ rows, data }: { rows: readonly BoardRow[]; data: BoardDrawingData }) {
  const ranked = rankedRows(rows);
  const left = ranked ? rankWidth : 0;
  const plot = left + 300;
  const height = rows.length * rowHeight + 30;
  return (
    <svg width={plot + plotWidth + 200} height={height}>
      <svg x={plot} width={plotWidth} height={height} className="ov">
        <g className="grid">{data.axis.ticks.map((tick) => <line key={tick.value} x1={`${tick.at}%`} x2={`${tick.at}%`} y1="0" y2={height - 22} />)}</g>
        {data.axis.ticks.map((tick) => <text key={tick.value} x={`${tick.at}%`} y={height - 4} textAnchor="middle">{tick.label}</text>)}
        {rows.map((row, i) => <svg key={row.accession} y={(i + 0.5) * rowHeight} className="ov"><Beam value={row.figure.value} intervals={row.figure.intervals} axis={data.axis} plotWidth={plotWidth} /></svg>)}
      </svg>
      {ranked ? <Brackets parts={boardParts(ranked)} /> : null}
      {rows.map((row, i) => (
        <g key={row.accession} className="plot-words">
          {row.rank && ranked ? <text className="t" x="28" y={(i + 0.5) * rowHeight + 5}>{rangeWords(row.rank)}</text> : null}
          <text className="t" x={left} y={(i + 0.5) * rowHeight - 2}>{row.device.name}</text>
          <text x={left} y={(i + 0.5) * rowHeight + 13}>{row.device.provider.name}{row.demo ? '; demonstration data' : ''}</text>
          <text className="t" x={plot + plotWidth + 24} y={(i + 0.5) * rowHeight - 2}>{figureValue(row.figure, data.decimals)}</text>
          <text x={plot + plotWidth + 24} y={(i + 0.5) * rowHeight + 13}>{figureRange(row.figure, 0.95, data.decimals)}</text>
        </g>
      ))}
    </svg>
  );
}

/** Brackets at the left edge; a line where every row above differs from every row below. */
function Brackets({ parts }: { parts: readonly BoardPart[] }) {
  return (
    <g>
      {parts.map(({ key, start, brackets }) => (
        <g key={key}>
          {start > 0 ? <line className="cutline" x1="0" x2="100%" y1={start * rowHeight} y2={start * rowHeight} /> : null}
          {brackets.map((b) => <path key={b.from} className="bracketline" d={`M${8 + 11 * b.lane} ${(start + b.from) * rowHeight + 7}h-7V${(start + b.to + 1) * rowHeight - 7}h7`} />)}
        </g>
      ))}
    </g>
  );
}
