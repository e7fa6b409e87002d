import { Link } from 'react-router-dom';
import type { BoardRow } from '#shared/contracts/boards.ts';
import { formatDate } from '#shared/domain/format-date.ts';
import { AxisStrip } from '#web/charts/axis-strip.tsx';
import { BeamPlot } from '#web/charts/beam-plot.tsx';
import { FigureText } from '#web/charts/figure-beams.tsx';
import { AccessionLink, entryPath, nameClass } from '#web/components/accession-link.tsx';
import { DemoTag } from '#web/components/demo.tsx';
import { tableRoles as r } from '#web/components/table-roles.ts';
import { modalityWords } from '#web/lib/modality-words.ts';
import { useOwnSelection } from '#web/lib/own-selection.ts';
import type { BoardDrawingData } from '../board-data.ts';

/** The board drawn: one row an entry, one axis for all rows. */
export function BoardRows({ rows, data, caption, quiet }: { rows: readonly BoardRow[]; data: BoardDrawingData; caption: string; quiet: string }) {
  const own = useOwnSelection();
  return (
    <table className="board" {...r.table}>
      <caption>{caption} <span className="quiet">{quiet}</span></caption>
      <thead {...r.group}>
        <tr {...r.row}>
          <th {...r.columnHead} scope="col" className="c-name">Device</th>
          <th {...r.columnHead} scope="col" className="c-plot"><span className="unseen">Drawn interval</span><AxisStrip axis={data.axis} side="top" /></th>
          <th {...r.columnHead} scope="col" className="c-val">Estimate<span className="unit">95 % interval</span></th>
          <th {...r.columnHead} scope="col" className="c-entry">Entry<span className="unit">last circuit run</span></th>
          <th {...r.columnHead} scope="col" className="c-own">Yours</th>
        </tr>
      </thead>
      <tbody {...r.group}>
        {rows.map((row) => {
          const mine = own.has(row.accession);
          return (
            <tr key={row.accession} {...r.row} className={mine ? 'own' : undefined}>
              <th {...r.rowHead} scope="row" className="c-name">
                <Link className={nameClass(row.device.name)} to={entryPath(row.accession, row.version)}>{row.device.name}</Link>
                <span className="sub">{row.device.provider.name}, {modalityWords[row.device.modality]}{row.demo ? <>; <DemoTag /></> : null}</span>
              </th>
              <td {...r.cell} className="c-plot"><BeamPlot axis={data.axis} value={row.figure.value} intervals={row.figure.intervals} own={mine} /></td>
              <td {...r.cell} className="c-val"><FigureText figure={row.figure} decimals={data.decimals} /></td>
              <td {...r.cell} className="c-entry"><AccessionLink accession={row.accession} version={row.version} /><span className="sub">{formatDate(row.lastCircuitAt)}</span></td>
              <td {...r.cell} className="c-own">
                <label className="ownbox"><input type="checkbox" checked={mine} onChange={() => own.toggle({ accession: row.accession, name: row.device.name })} /><span className="unseen">Mark {row.device.name} as yours</span></label>
              </td>
            </tr>
          );
        })}
      </tbody>
      <tfoot {...r.group}><tr {...r.row}><td {...r.cell} /><td {...r.cell} className="c-plot"><AxisStrip axis={data.axis} side="bottom" /></td><td {...r.cell} colSpan={3} /></tr></tfoot>
    </table>
  );
}
