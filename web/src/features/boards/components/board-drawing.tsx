import type { BoardRow } from '#shared/contracts/boards.ts';
import { figureRange, figureValue } from '#shared/domain/figure-words.ts';
import { Beam } from '#web/charts/beam.tsx';
import type { BoardDrawingData } from '../board-data.ts';

const rowHeight = 36;
const plot = { from: 300, width: 420 };

/** The board as one drawing, for the SVG file: names, beams on the common axis, numbers. */
export function BoardDrawing({ rows, data, width = 920 }: { rows: readonly BoardRow[]; data: BoardDrawingData; width?: number }) {
  const height = rows.length * rowHeight + 30;
  return (
    <svg width={width} height={height}>
      <svg x={plot.from} width={plot.width} height={height} className="ov">
        <g className="grid">{data.axis.ticks.map((tick) => <line key={tick.value} x1={`${tick.at}%`} x2={`${tick.at}%`} y1="0" y2={height - 22} />)}</g>
        {data.axis.ticks.map((tick) => <text key={tick.value} x={`${tick.at}%`} y={height - 4} textAnchor="middle">{tick.label}</text>)}
        {rows.map((row, i) => <svg key={row.accession} y={(i + 0.5) * rowHeight} className="ov"><Beam value={row.figure.value} intervals={row.figure.intervals} axis={data.axis} plotWidth={plot.width} /></svg>)}
      </svg>
      {rows.map((row, i) => (
        <g key={row.accession} className="plot-words">
          <text className="t" x="0" y={(i + 0.5) * rowHeight - 2}>{row.device.name}</text>
          <text x="0" y={(i + 0.5) * rowHeight + 13}>{row.device.provider.name}{row.demo ? '; demonstration data' : ''}</text>
          <text className="t" x={plot.from + plot.width + 24} y={(i + 0.5) * rowHeight - 2}>{figureValue(row.figure, data.decimals)}</text>
          <text x={plot.from + plot.width + 24} y={(i + 0.5) * rowHeight + 13}>{figureRange(row.figure, 0.95, data.decimals)}</text>
        </g>
      ))}
    </svg>
  );
}
