import { useMemo } from 'react';
import type { LogGrowth } from '#shared/contracts/log.ts';
import { ChartFrame } from '#web/charts/chart-frame.tsx';
import { Points } from '#web/charts/points.tsx';
import { Stretched, XYPlot } from '#web/charts/xy-plot.tsx';
import { growthDrawing } from '../growth-data.ts';

/** How the log grew; it never shrinks. */
export function GrowthChart({ growth }: { growth: LogGrowth }) {
  const drawing = useMemo(() => growthDrawing(growth), [growth]);
  if (!drawing) return <p className="prose quiet">The growth is drawn once the log has leaves of two months.</p>;
  const { points, path, x, y, table } = drawing;
  return (
    <ChartFrame title="Leaves in the log" quiet="at the end of each month, UTC" table={table} fileName="evenbeam-log-growth"
      says="Each point is a month in which something was frozen or withdrawn. The line can only rise: nothing is ever taken out. It counts events, not devices, and says nothing about their quality.">
      <XYPlot x={x} y={y} xTitle="Year" yTitle="Leaves" label="Size of the log by month" height="low">
        <Stretched><path className="line" d={path} /></Stretched>
        <Points label="Months" points={points.map((p) => ({ key: p.key, label: p.label, draw: <circle className="pt" cx={`${p.x}%`} cy={`${p.y}%`} r="3" /> }))} />
      </XYPlot>
    </ChartFrame>
  );
}
