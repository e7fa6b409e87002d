import { useMemo } from 'react';
import type { Entry } from '#shared/contracts/entries.ts';
import { capitalise, countInWords, formatCount, plural } from '#shared/domain/format.ts';
import { upright } from '#web/charts/axis.ts';
import { ChartFrame } from '#web/charts/chart-frame.tsx';
import { Points } from '#web/charts/points.tsx';
import { Stretched, XYPlot } from '#web/charts/xy-plot.tsx';
import { fileTitle } from '../entry-words.ts';
import { sealedDrawing } from '../sealed-data.ts';

/** Sealed circuits: predicted against observed, and what is left over beside shot noise. */
export function SealedCharts({ entry, sealed }: { entry: Entry; sealed: Entry['sealedPoints'] }) {
  const drawing = useMemo(() => sealedDrawing(sealed), [sealed]);
  const { points, share, residual, ellipse, shots, outside, table } = drawing;
  const observed = useMemo(() => upright(share), [share]);
  const outcome = sealed[0]?.outcome ?? '';
  const same = sealed.every((p) => p.outcome === outcome);
  const of = same ? `outcome ${outcome}` : 'the outcome read';
  const stem = `evenbeam-${entry.accession}.${entry.version}-sealed`;
  const n = points.length;
  return (
    <div className="sealpair">
      <ChartFrame title="Predicted and observed" fileTitle={fileTitle(entry, 'sealed circuits, predicted and observed')} table={table} fileName={`${stem}-observed`}
        says={`Each point is one sealed circuit. On the thin line observation and prediction agree.`}>
        <XYPlot x={share} y={observed} xTitle="Predicted" yTitle={`Observed share of ${of}`} height="mid" verticals label={`Observed against predicted share, ${n} sealed circuits`}>
          <Stretched><path className="edgeline" d={`M${share.at(0)} ${observed.at(0)}L${share.at(1)} ${observed.at(1)}`} /></Stretched>
          <Points label="Sealed circuits" points={points.map((p) => ({ key: p.id, label: p.label, draw: <circle className="pt" cx={`${share.at(p.predicted)}%`} cy={`${observed.at(p.observed)}%`} r="3.5" /> }))} />
        </XYPlot>
      </ChartFrame>
      <ChartFrame title="What is left over" fileTitle={fileTitle(entry, 'sealed circuits, observed minus predicted')} table={table} fileName={`${stem}-left-over`}
        says={`The grey range holds 95 % of points that only shot noise of ${formatCount(shots)} shots moves, so about one in twenty falls outside by chance; here ${outside === 0 ? 'none does' : `${countInWords(outside)} of ${countInWords(n)} ${plural(outside, 'does', 'do')}`}. Agreement here does not prove that longer circuits would agree.`}>
        <XYPlot x={residual.x} y={residual.y} xTitle={`Predicted share of ${of}`} yTitle="Observed minus predicted" height="mid" label={`Observed minus predicted share, ${n} sealed circuits. ${capitalise(countInWords(outside))} outside the range of shot noise`}>
          <Stretched><path className="b95" d={ellipse.fill} /><path className="edgeline" d={ellipse.upper} /><path className="edgeline" d={ellipse.lower} /></Stretched>
          <g aria-hidden="true">
            <line className="zero" x1="0" x2="100%" y1={`${residual.y.at(0)}%`} y2={`${residual.y.at(0)}%`} />
          </g>
          <Points label="Sealed circuits" points={points.map((p) => ({ key: p.id, label: p.label, draw: <circle className="pt" cx={`${residual.x.at(p.predicted)}%`} cy={`${residual.y.at(p.left)}%`} r="3.5" /> }))} />
          <text aria-hidden="true" className="over" x="50%" y={`${drawing.ellipseTop}%`} dy="-7" textAnchor="middle">shot noise alone, 95 %</text>
        </XYPlot>
      </ChartFrame>
    </div>
  );
}
