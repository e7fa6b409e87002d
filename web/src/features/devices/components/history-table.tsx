import { joinWords } from '#shared/domain/format.ts';
import { formatDate } from '#shared/domain/format-date.ts';
import { AxisStrip } from '#web/charts/axis-strip.tsx';
import { BeamPlot } from '#web/charts/beam-plot.tsx';
import { FigureText } from '#web/charts/figure-beams.tsx';
import { AccessionLink } from '#web/components/accession-link.tsx';
import { tableRoles as r } from '#web/components/table-roles.ts';
import type { HistoryGroup } from '../history-data.ts';

/** Headline figures of one device over time, on one axis. */
export function HistoryTable({ group, device }: { group: HistoryGroup; device: string }) {
  return (
    <table className="board history" {...r.table}>
      <caption>Retained signal at depth 16 <span className="quiet">(higher is better; 1 is an ideal device)</span></caption>
      <thead {...r.group}>
        <tr {...r.row}>
          <th {...r.columnHead} scope="col" className="c-name">Last circuit run<span className="unit">register</span></th>
          <th {...r.columnHead} scope="col" className="c-plot"><span className="unseen">Drawn interval</span><AxisStrip axis={group.axis} side="top" /></th>
          <th {...r.columnHead} scope="col" className="c-val">Estimate<span className="unit">95 % interval</span></th>
          <th {...r.columnHead} scope="col" className="c-entry">Entry<span className="unit">method</span></th>
        </tr>
      </thead>
      <tbody {...r.group}>
        {group.items.map((item) => (
          <tr key={`${item.accession}.${item.version}`} {...r.row}>
            <th {...r.rowHead} scope="row" className="c-name"><span className="unseen">{device}, </span><b className="num">{formatDate(item.lastCircuitAt)}</b><span className="sub">{joinWords(item.register)}</span></th>
            {item.headline && item.headline.value !== null ? (
              <>
                <td {...r.cell} className="c-plot"><BeamPlot axis={group.axis} value={item.headline.value} intervals={item.headline.intervals} /></td>
                <td {...r.cell} className="c-val"><FigureText figure={item.headline} decimals={group.decimals} /></td>
              </>
            ) : (
              <td {...r.cell} colSpan={2} className="c-none"><span className="undetermined">Not determined by this gate set.</span> <span className="sub">{item.headline?.reason}</span></td>
            )}
            <td {...r.cell} className="c-entry"><AccessionLink accession={item.accession} version={item.version} /><span className="sub">{item.method}</span></td>
          </tr>
        ))}
      </tbody>
    </table>
  );
}
