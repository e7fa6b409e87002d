import { useMemo } from 'react';
import { Link } from 'react-router-dom';
import type { Review } from '#shared/contracts/reviews.ts';
import { columnDecimals } from '#shared/domain/figure-words.ts';
import { linearAxis } from '#web/charts/axis.ts';
import { AxisStrip } from '#web/charts/axis-strip.tsx';
import { beamExtent } from '#web/charts/beam-geometry.ts';
import { BeamPlot } from '#web/charts/beam-plot.tsx';
import { FigureText } from '#web/charts/figure-beams.tsx';
import { tableRoles as r } from '#web/components/table-roles.ts';
import { When } from '#web/components/when.tsx';

type Figure = Review['earlier'][number]['headline'];

interface Row {
  key: string;
  name: React.ReactNode;
  figure: Figure;
}

const isDetermined = (figure: Figure): figure is NonNullable<Figure> => figure !== null && figure.value !== null;

/** Retained signal at depth 16 of this dataset and of the device's earlier entries, on one axis. */
export function EarlierEntries({ earlier, submission }: Pick<Review, 'earlier' | 'submission'>) {
  const rows = useMemo((): Row[] => [
    { key: 'this', name: <b>This dataset</b>, figure: submission.result?.figures.find((f) => f.key === 'retained-signal' && f.depth === 16) ?? null },
    ...earlier.map((e) => ({ key: `${e.accession}.${e.version}`, name: <><Link className="nowrap" to={`/entries/${e.accession}/v/${e.version}`}>{`${e.accession}.${e.version}`}</Link><span className="sub"><When at={e.frozenAt} /></span></>, figure: e.headline })),
  ], [earlier, submission]);
  const drawn = useMemo(() => rows.map((row) => row.figure).filter(isDetermined), [rows]);
  const axis = useMemo(() => linearAxis(beamExtent(drawn), { count: 4, pad: 0.15 }), [drawn]);
  const decimals = columnDecimals(drawn);
  if (earlier.length === 0) return <p className="says">This is the first dataset of the device in this gate class.</p>;
  return (
    <table className="prev stack earlier" {...r.table}>
      <caption>Retained signal, depth 16 <span className="quiet">(all on one axis; overlap decides nothing)</span></caption>
      <thead {...r.group}>
        <tr {...r.row}>
          <th {...r.columnHead} scope="col" className="p1">Entry</th>
          <th {...r.columnHead} scope="col" className="px"><span className="unseen">Drawn interval</span>{drawn.length > 0 ? <AxisStrip axis={axis} side="top" /> : null}</th>
          <th {...r.columnHead} scope="col" className="p3">Estimate<span className="unit">95{'\u202f'}% interval</span></th>
        </tr>
      </thead>
      <tbody {...r.group}>
        {rows.map(({ key, name, figure }) => (
          <tr key={key} {...r.row}>
            <th {...r.rowHead} scope="row" className="row">{name}</th>
            {isDetermined(figure) ? (
              <>
                <td {...r.cell} className="px"><div className="mini"><BeamPlot axis={axis} value={figure.value} intervals={figure.intervals} /></div></td>
                <td {...r.cell} className="p3"><FigureText figure={figure} decimals={decimals} /></td>
              </>
            ) : <td {...r.cell} colSpan={2}><span className="undetermined">Not determined by this gate set.</span></td>}
          </tr>
        ))}
      </tbody>
    </table>
  );
}
