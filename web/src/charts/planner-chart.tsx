import { useMemo } from 'react';
import { decimalsFor, formatCount, formatNumber } from '#shared/domain/format.ts';
import { ChartFrame } from './chart-frame.tsx';
import { plannerDrawing, shortCount, type PlannerCurve, type PlannerPoint } from './planner-data.ts';
import { Points, type PlotPoint } from './points.tsx';
import { Stretched, XYPlot } from './xy-plot.tsx';

interface PlannerChartProps {
  curves: readonly PlannerCurve[];
  /** The reader's plan: drawn in the accent. */
  plan: PlannerPoint | null;
  /** Half-width wanted: a dashed level line. */
  wanted: number | null;
  /** The cheapest plan that reaches the wanted half-width. */
  cheapest: PlannerPoint | null;
  fileName: string;
}

const width = (halfWidth: number): string => `±${formatNumber(halfWidth, decimalsFor(halfWidth))}`;
const none: readonly PlannerPoint[] = [];
/** Per cent of the height: a label above a point that lies higher would run into the title of the axis. */
const roomAbove = 20;

/** What certainty costs: the half-width of an interval against the shots of the whole sheet. */
export function PlannerChart({ curves, plan, wanted, cheapest, fileName }: PlannerChartProps) {
  const marks = useMemo(() => (plan || cheapest ? [plan, cheapest].filter((p) => p !== null) : none), [plan, cheapest]);
  const { x, y, curves: lines, table } = useMemo(() => plannerDrawing(curves, marks, wanted), [curves, marks, wanted]);
  const points: PlotPoint[] = [];
  if (plan) points.push({ key: 'plan', label: `Your plan: ${formatCount(plan.shots)} shots, ${width(plan.halfWidth)}`, draw: <circle className="ownpt dot" cx={`${x.at(plan.shots)}%`} cy={`${y.at(plan.halfWidth)}%`} r="6" /> });
  if (cheapest) points.push({ key: 'cheapest', label: `Cheapest plan that reaches the wanted width: ${formatCount(cheapest.shots)} shots, ${width(cheapest.halfWidth)}`, draw: <svg x={`${x.at(cheapest.shots)}%`} y={`${y.at(cheapest.halfWidth)}%`} className="ov"><path className="hollow dot" d="M0 -7L7 0L0 7L-7 0Z" /></svg> });
  return (
    <ChartFrame title="What certainty costs" fileName={fileName} table={table}
      says="Because the method is linear, these widths are known before a shot is taken. They hold if the device behaves as assumed; drift during the run is not in them.">
      <div className="rightlabels">
        <XYPlot x={x} y={y} xTitle="Total shots" yTitle="Half-width of the 95 % interval" label={`Half-width against shots, ${curves.length} curves`} height="high" verticals>
          <Stretched>{lines.map((line) => <path key={line.name} className={line.main ? 'line' : 'edgeline'} d={line.path} />)}</Stretched>
          <g aria-hidden="true">
            {wanted === null ? null : <><line className="wanted" x1="0" x2="100%" y1={`${y.at(wanted)}%`} y2={`${y.at(wanted)}%`} /><text className="lab" x="0" dx="6" y={`${y.at(wanted)}%`} dy="-7">wanted: {width(wanted)}</text></>}
            {lines.map((line) => <text key={line.name} className={line.main ? 't' : undefined} x={`${line.end.x}%`} dx="8" y={`${line.end.y}%`} dy="4">{line.name}</text>)}
            {plan ? <Leader x={x.at(plan.shots)} y={y.at(plan.halfWidth)} up={y.at(plan.halfWidth) > roomAbove} words={`your plan, ${width(plan.halfWidth)}`} own /> : null}
            {cheapest ? <Leader x={x.at(cheapest.shots)} y={y.at(cheapest.halfWidth)} up={false} words={`cheapest, ${shortCount(cheapest.shots)} shots`} /> : null}
          </g>
          {points.length > 0 ? <Points label="Plans" points={points} /> : null}
        </XYPlot>
      </div>
    </ChartFrame>
  );
}

/** A short line from a point to its name. */
function Leader({ x, y, up, words, own = false }: { x: number; y: number; up: boolean; words: string; own?: boolean }) {
  const right = x > 60;
  return (
    <svg x={`${x}%`} y={`${y}%`} className="ov">
      <line className={own ? 'ownleader' : 'dimn'} x1="0" x2="0" y1={up ? -8 : 9} y2={up ? -52 : 44} />
      <text className={own ? 'owntext' : 'lab'} x={right ? -7 : 7} y={up ? -46 : 46} textAnchor={right ? 'end' : 'start'}>{words}</text>
    </svg>
  );
}
