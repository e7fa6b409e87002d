import { useMemo } from 'react';
import { ChartFrame } from './chart-frame.tsx';
import { driftDrawing, expectedRange, type DriftBlock } from './drift-data.ts';
import { Points } from './points.tsx';
import { XYPlot } from './xy-plot.tsx';

/** Misfit by block: does the device stay the same during the run? */
export function DriftChart({ blocks, fileName, title = 'Misfit of each block' }: { blocks: readonly DriftBlock[]; fileName: string; title?: string }) {
  const { points, x, y, table, says } = useMemo(() => driftDrawing(blocks), [blocks]);
  const top = y.at(expectedRange);
  const named = points.filter((p) => p.outside);
  return (
    <ChartFrame title={title} says={says} table={table} fileName={fileName}>
      <XYPlot x={x} y={y} xTitle="Block, in order of time" yTitle="Misfit, σ" label={`Misfit of ${blocks.length} blocks`} height="low">
        <g aria-hidden="true">
          <rect className="b95" x="0" width="100%" y={`${top}%`} height={`${y.at(-expectedRange) - top}%`} />
          <line className="zero" x1="0" x2="100%" y1={`${y.at(0)}%`} y2={`${y.at(0)}%`} />
          <text x="100%" y={`${y.at(-expectedRange)}%`} dx="-6" dy="-7" textAnchor="end">expected range</text>
        </g>
        <Points label="Blocks" points={points.map((p) => ({ key: String(p.block), label: p.label, draw: <circle className={p.outside ? 'hollow dot' : 'pt'} cx={`${x.at(p.block)}%`} cy={`${y.at(p.sigmas)}%`} r={p.outside ? 5 : 4} /> }))} />
        <g aria-hidden="true">
          {named.map((p) => <text key={p.block} className="lab" x={`${x.at(p.block)}%`} y={`${y.at(p.sigmas)}%`} dx={x.at(p.block) > 70 ? -12 : 12} dy="4" textAnchor={x.at(p.block) > 70 ? 'end' : 'start'}>block {p.block}</text>)}
        </g>
      </XYPlot>
    </ChartFrame>
  );
}
