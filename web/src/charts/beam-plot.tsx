import type { Axis } from './axis.ts';
import { Beam, type BeamProps } from './beam.tsx';
import { useElementWidth } from './use-element-width.ts';

export interface BeamPlotProps extends Pick<BeamProps, 'value' | 'intervals' | 'own' | 'mark'> {
  axis: Axis;
  /** Draws a firm upright line at zero. */
  zero?: boolean;
  /** Draws a dotted upright line: "the same as". */
  reference?: number;
}

/** The beam of one row on the axis it shares with the other rows. Fills its cell; the numbers stand beside it as text. */
export function BeamPlot({ axis, zero = false, reference, ...beam }: BeamPlotProps) {
  const [ref, width] = useElementWidth<SVGSVGElement>(360);
  return (
    <svg ref={ref} className="cellplot" width="100%" height="100%" aria-hidden="true" focusable="false">
      <g className="grid">{axis.ticks.map((tick) => <line key={tick.value} x1={`${tick.at}%`} x2={`${tick.at}%`} y1="0" y2="100%" />)}</g>
      {zero ? <line className="zero" x1={`${axis.at(0)}%`} x2={`${axis.at(0)}%`} y1="0" y2="100%" /> : null}
      {reference === undefined ? null : <line className="same" x1={`${axis.at(reference)}%`} x2={`${axis.at(reference)}%`} y1="0" y2="100%" />}
      <svg y="50%" className="ov"><Beam {...beam} axis={axis} plotWidth={width} /></svg>
    </svg>
  );
}
