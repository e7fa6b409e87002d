import type { Axis } from './axis.ts';

/** Index from which every second word is kept, so that zero keeps its own. */
const zeroAt = (axis: Axis): number => Math.max(0, axis.ticks.findIndex((tick) => tick.value === 0));

/** The named values of an axis, above (ticks below the words) or below the rows it belongs to. `narrow` keeps every second word where there are many. */
export function AxisStrip({ axis, side, narrow = false }: { axis: Axis; side: 'top' | 'bottom'; narrow?: boolean }) {
  const top = side === 'top';
  const height = top ? 26 : 22;
  const every = narrow && axis.ticks.length > 3 ? 2 : 1;
  const first = zeroAt(axis);
  return (
    <svg className={`axis ${side}`} width="100%" height={height} aria-hidden="true" focusable="false">
      {axis.ticks.map((tick, i) => (
        <g key={tick.value}>
          <line className="axisline" x1={`${tick.at}%`} x2={`${tick.at}%`} y1={top ? 21 : 0} y2={top ? 26 : 5} />
          {(i - first) % every === 0 ? <text x={`${tick.at}%`} y={top ? 17 : 18} textAnchor="middle">{tick.label}</text> : null}
        </g>
      ))}
    </svg>
  );
}
