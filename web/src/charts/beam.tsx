import type { Interval } from '#shared/formats/types.ts';
import type { Axis } from './axis.ts';
import { beamParts } from './beam-geometry.ts';
import { MarkShape, type MarkNumber } from './mark-shape.tsx';

export interface BeamProps {
  value: number | null;
  intervals: readonly Interval[] | null;
  axis: Axis;
  /** Width of the plot in pixels: decides whether the 50 % block is wider than the dot. */
  plotWidth: number;
  /** The reader's own choice: accent, dot filled. */
  own?: boolean;
  /** Second, third … of several entries in one plot: another colour and another shape in place of the dot. */
  mark?: MarkNumber;
}

/** One estimate with its uncertainty, centred on y = 0 of the SVG it stands in. */
export function Beam({ value, intervals, axis, plotWidth, own = false, mark }: BeamProps) {
  const { dot, bars } = beamParts(value, intervals, axis, plotWidth);
  const className = ['beam', own ? 'own' : '', mark ? `m${mark}` : ''].filter(Boolean).join(' ');
  return (
    <g className={className}>
      {bars.map((bar) => <rect key={bar.level} x={`${bar.from}%`} width={`${bar.width}%`} y={-bar.height / 2} height={bar.height} />)}
      {dot === null ? null : mark && mark > 1 ? <svg x={`${dot}%`} className="ov"><MarkShape mark={mark} size={5} /></svg> : <circle className="dot" cx={`${dot}%`} cy={0} r={3.5} />}
    </g>
  );
}
