import type { Entry } from '#shared/contracts/entries.ts';
import { figureRange, figureValue } from '#shared/domain/figure-words.ts';
import type { Scale } from '#shared/domain/format.ts';
import type { Axis } from '#web/charts/axis.ts';
import { AxisStrip } from '#web/charts/axis-strip.tsx';
import { BeamPlot } from '#web/charts/beam-plot.tsx';
import { tableRoles as r } from '#web/components/table-roles.ts';
import type { GateFigures } from '../gate-rows.ts';

type EntryFigure = Entry['figures'][number];

function FigureCells({ figure, axis, decimals, scale = 'plain', name, brief = false }: { figure: EntryFigure | null; axis: Axis; decimals: number; scale?: Scale; name: string; brief?: boolean }) {
  // Half of a register's gates have no angle: the reason stands once beside the table.
  if (brief && hasNoAngle(figure)) return <td {...r.cell} colSpan={2} className="nd" data-l={name}><span className="undetermined">Not defined.</span></td>;
  if (!figure || figure.value === null) {
    return <td {...r.cell} colSpan={2} className="nd" data-l={name}><span className="undetermined">Not determined by this gate set.</span> <span className="sub">{figure?.reason}</span></td>;
  }
  return (
    <>
      <td {...r.cell} className="ax">
        <BeamPlot axis={axis} value={figure.value} intervals={figure.intervals} zero={axis.domain[0] < 0} />
        <div className="phoneaxis"><AxisStrip axis={axis} side="bottom" narrow /></div>
      </td>
      <td {...r.cell} className="two" data-l={name}><b>{figureValue(figure, decimals, scale)}</b><span className="sub">{figureRange(figure, 0.95, decimals, scale) ?? 'no interval'}</span></td>
    </>
  );
}

/** Not a lack of data: nothing turns. */
export const hasNoAngle = (figure: EntryFigure | null): boolean => figure !== null && figure.value === null && (figure.reason ?? '').startsWith('not defined');

const determined = (figure: EntryFigure | null): boolean => figure !== null && figure.value !== null;

/** No axis over a column in which nothing is determined: its ticks would stand for nothing. */
function AxisHead({ label, axis, drawn }: { label: string; axis: Axis; drawn: boolean }) {
  return <th {...r.columnHead} scope="col" className="ax"><span className="lbl">{label}</span>{drawn ? <AxisStrip axis={axis} side="top" /> : null}</th>;
}

/** Gate loss and angle error side by side, each with one axis for all gates. `register`: gates are named with their qubits. */
export function GateTable({ figures, register = false }: { figures: GateFigures; register?: boolean }) {
  const { rows, loss, angle } = figures;
  return (
    <table className={register ? 'figs register' : 'figs'} {...r.table}>
      <caption>Gate loss (thousandths) and angle error (radians) <span className="quiet">each on an axis of its own, 95 % intervals in figures</span></caption>
      <thead {...r.group}>
        <tr {...r.row}>
          <th {...r.columnHead} scope="col">Gate</th>
          <AxisHead label="Gate loss, thousandths" axis={loss.axis} drawn={rows.some((row) => determined(row.loss))} />
          <th {...r.columnHead} scope="col">Estimate<span className="unit">95 % interval</span></th>
          <AxisHead label="Angle error, radians" axis={angle.axis} drawn={rows.some((row) => determined(row.angle))} />
          <th {...r.columnHead} scope="col">Estimate<span className="unit">95 % interval</span></th>
        </tr>
      </thead>
      <tbody {...r.group}>
        {rows.map((row) => (
          <tr key={row.label} {...r.row}>
            <th {...r.rowHead} scope="row" className="row">{row.words}</th>
            <FigureCells figure={row.loss} axis={loss.axis} decimals={loss.decimals} scale="thousandths" name="Gate loss" />
            <FigureCells figure={row.angle} axis={angle.axis} decimals={angle.decimals} name="Angle error" brief={register} />
          </tr>
        ))}
      </tbody>
    </table>
  );
}
