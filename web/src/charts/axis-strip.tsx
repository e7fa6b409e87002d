import type { Axis } from './axis.ts';

/** The named values of an axis, above (ticks below the words) or below the rows it belongs to. `every` thins the words on a narrow plot. */
export function AxisStrip({ axis, side, every = 1 }: { axis: Axis; side: 'top' | 'bottom'; every?: number }) {
  const top = side === 'top';
  const height = top ? 26 : 22;
  return (
    <svg className={`axis ${side}`} width="100%" height={height} aria-hidden="true" focusable="false">
      {axis.ticks.map((tick, i) => (
        <g key={tick.value}>
          <line className="axisline" x1={`${tick.at}%`} x2={`${tick.at}%`} y1={top ? 21 : 0} y2={top ? 26 : 5} />
          {i % every === 0 ? <text x={`${tick.at}%`} y={top ? 17 : 18} textAnchor="middle">{tick.label}</text> : null}
        </g>
      ))}
    </svg>
  );
}
