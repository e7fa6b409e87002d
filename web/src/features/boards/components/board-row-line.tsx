import type { CSSProperties } from 'react';
import { Link } from 'react-router-dom';
import type { BoardRow } from '#shared/contracts/boards.ts';
import { formatDate } from '#shared/domain/format-date.ts';
import { BeamPlot } from '#web/charts/beam-plot.tsx';
import { FigureText } from '#web/charts/figure-beams.tsx';
import { AccessionLink, entryPath, nameClass } from '#web/components/accession-link.tsx';
import { DemoTag } from '#web/components/demo.tsx';
import { tableRoles as r } from '#web/components/table-roles.ts';
import { modalityWords } from '#web/lib/modality-words.ts';
import { useOwnSelection } from '#web/lib/own-selection.ts';
import type { BoardDrawingData } from '../board-data.ts';
import type { Bracket } from '../board-parts.ts';
import { RankCell } from './rank-cell.tsx';

/** What a ranked row has beside its figure: its place among the rows of its part, the brackets of that part, and the words for both. */
export interface RowPlace {
  at: number;
  brackets: readonly Bracket[];
  ties: string;
  places: number;
}

const tieClass = (at: number, { from, to }: Bracket): string => ['tie', at === from ? 'first' : '', at === to ? 'last' : ''].filter(Boolean).join(' ');

/** One entry of the drawn board. */
export function BoardRowLine({ row, data, place }: { row: BoardRow; data: BoardDrawingData; place?: RowPlace }) {
  const own = useOwnSelection();
  const mine = own.has(row.accession);
  return (
    <tr {...r.row} className={mine ? 'own' : undefined}>
      {place && row.rank ? (
        <>
          <td {...r.cell} className="ties">
            {place.brackets.filter(({ from, to }) => from <= place.at && place.at <= to).map((bracket) => <span key={bracket.lane} className={tieClass(place.at, bracket)} style={{ '--c': bracket.lane } as CSSProperties} />)}
            <span className="unseen">{place.ties}</span>
          </td>
          <td {...r.cell} className="c-rank"><RankCell rank={row.rank} places={place.places} /></td>
        </>
      ) : null}
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
}
