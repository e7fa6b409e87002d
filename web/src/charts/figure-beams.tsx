import { useMemo } from 'react';
import { columnDecimals, figureDecimals, figureRange, figureValue, type FigureLike } from '#shared/domain/figure-words.ts';
import type { ReactNode } from 'react';
import { linearAxis } from './axis.ts';
import { AxisStrip } from './axis-strip.tsx';
import { beamExtent } from './beam-geometry.ts';
import { BeamPlot } from './beam-plot.tsx';

/** A beam on an axis of its own, for rows whose figures cannot share one (a preview). */
export function OwnAxisBeam({ figure }: { figure: FigureLike }) {
  const axis = useMemo(() => linearAxis(beamExtent([figure]), { count: 3, pad: 0.35 }), [figure]);
  return (
    <div className="ownaxis">
      <div className="mini"><BeamPlot axis={axis} value={figure.value} intervals={figure.intervals} /></div>
      <AxisStrip axis={axis} side="bottom" />
    </div>
  );
}

/** An estimate over its 95 % interval. Give `decimals` where the digits of a column must agree. */
export function FigureText({ figure, decimals }: { figure: FigureLike; decimals?: number }) {
  const digits = decimals ?? figureDecimals(figure);
  return (
    <>
      <b>{figureValue(figure, digits)}</b>
      <span className="sub">{figureRange(figure, 0.95, digits) ?? 'no interval'}</span>
    </>
  );
}

export interface PreviewRow {
  key: string;
  name: string;
  figure: FigureLike & { reason: string | null };
  /** Last column, e.g. what the run sheet had forecast. */
  extra?: ReactNode;
}

/** Figures one under the other, each on an axis of its own: the preview of a submission. */
export function PreviewFigures({ caption, quiet, rows, extraHead }: { caption: string; quiet?: string; rows: readonly PreviewRow[]; extraHead?: string }) {
  return (
    <table className="prev stack">
      <caption>{caption}{quiet ? <span className="quiet"> {quiet}</span> : null}</caption>
      <thead>
        <tr>
          <th scope="col" className="p1">Figure</th>
          <th scope="col"><span className="unseen">Drawn interval</span></th>
          <th scope="col" className="p3">Estimate<span className="unit">95 % interval</span></th>
          {extraHead ? <th scope="col" className="p4">{extraHead}</th> : null}
        </tr>
      </thead>
      <tbody>
        {rows.map(({ key, name, figure, extra }) => (
          <tr key={key}>
            <th scope="row" className="row">{name}</th>
            {figure.value === null ? (
              <td colSpan={extraHead ? 3 : 2}><span className="undetermined">Not determined by this gate set.</span> <span className="sub">{figure.reason}</span></td>
            ) : (
              <>
                <td className="px"><OwnAxisBeam figure={figure} /></td>
                <td className="p3"><FigureText figure={figure} decimals={columnDecimals([figure])} /></td>
                {extraHead ? <td className="p4" data-l={extraHead}>{extra}</td> : null}
              </>
            )}
          </tr>
        ))}
      </tbody>
    </table>
  );
}
