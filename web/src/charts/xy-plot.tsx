import type { ReactNode } from 'react';
import type { Axis } from './axis.ts';

/** Two axes with level titles: y above its left end, x at its right end below. `y` must be turned upright. */
export function XYPlot({ x, y, xTitle, yTitle, label, height, verticals = false, children }: { x: Axis; y: Axis; xTitle: string; yTitle: string; label: string; height: 'low' | 'mid' | 'high'; verticals?: boolean; children: ReactNode }) {
  return (
    <div className={`plot ${height}`}>
      <svg role="group" aria-label={label}>
        <g className="grid" aria-hidden="true">
          {y.ticks.map((tick) => <line key={tick.value} x1="0" x2="100%" y1={`${tick.at}%`} y2={`${tick.at}%`} />)}
          {verticals ? x.ticks.map((tick) => <line key={tick.value} x1={`${tick.at}%`} x2={`${tick.at}%`} y1="0" y2="100%" />) : null}
        </g>
        <g aria-hidden="true">
          {y.ticks.map((tick) => <text key={tick.value} x="-10" y={`${tick.at}%`} dy="4" textAnchor="end">{tick.label}</text>)}
          {x.ticks.map((tick) => <text key={tick.value} x={`${tick.at}%`} y="100%" dy="19" textAnchor="middle">{tick.label}</text>)}
          <text className="t" x="0" dx="-44" y="-14">{yTitle}</text>
          <text className="t" x="100%" y="100%" dy="38" textAnchor="end">{xTitle}</text>
        </g>
        {children}
        <line className="axisline" x1="0" x2="100%" y1="100%" y2="100%" />
      </svg>
    </div>
  );
}

/** A layer of 100 by 100 units stretched over the plot, for paths; line widths do not stretch. */
export function Stretched({ children }: { children: ReactNode }) {
  return <svg viewBox="0 0 100 100" preserveAspectRatio="none" width="100%" height="100%" aria-hidden="true" focusable="false">{children}</svg>;
}
