import { useRef, useState, type ReactNode } from 'react';
import { scrollRegion } from '#web/components/table-roles.ts';
import { saveFile } from '#web/lib/save-file.ts';
import { toCsv, type ChartTable } from './chart-table.ts';
import { Readout } from './readout.ts';
import { standaloneSvg } from './standalone-svg.ts';

interface ChartFrameProps {
  title: string;
  /** Quiet words after the title. */
  quiet?: string;
  /** One plain sentence: what is drawn, and what may not be concluded. */
  says: ReactNode;
  table: ChartTable;
  /** Stem of the names of downloaded files. */
  fileName: string;
  /** Title inside the drawing's file, where the page around it is missing; the title without it. */
  fileTitle?: string;
  children: ReactNode;
}

/** A chart with all that belongs to it: title, sentence, the same numbers as a table, and both as files. */
export function ChartFrame({ title, quiet, says, table, fileName, fileTitle, children }: ChartFrameProps) {
  const plot = useRef<HTMLDivElement>(null);
  const [read, setRead] = useState<string | null>(null);
  const saveDrawing = (): void => {
    const drawn = plot.current?.querySelector('svg');
    if (drawn) saveFile(`${fileName}.svg`, 'image/svg+xml', standaloneSvg(drawn, fileTitle ?? title));
  };
  return (
    <figure>
      <figcaption>{title}{quiet ? <span className="quiet"> {quiet}</span> : null}</figcaption>
      <div ref={plot}><Readout value={setRead}>{children}</Readout></div>
      <p className="readout" aria-hidden="true">{read}</p>
      <p className="says">{says}</p>
      <details>
        <summary>The same numbers as a table</summary>
        <div {...scrollRegion(table.caption)}>
          <table className="tight">
            <caption className="unseen">{table.caption}</caption>
            <thead><tr>{table.columns.map((c) => <th key={c.csv} scope="col" className={c.numeric ? 'n' : undefined}>{c.head}</th>)}</tr></thead>
            <tbody>{table.rows.map((row, i) => <tr key={i}>{row.map((c, j) => {
              const column = table.columns[j];
              const className = column?.numeric ? 'n' : undefined;
              return j === 0 ? <th key={j} scope="row" className={className}>{c.text}</th> : <td key={j} className={className}>{c.text}</td>;
            })}</tr>)}</tbody>
          </table>
        </div>
      </details>
      <p className="takeaway noprint">
        <button type="button" className="linkish" onClick={saveDrawing}>Drawing (SVG)</button>
        <button type="button" className="linkish" onClick={() => saveFile(`${fileName}.csv`, 'text/csv', toCsv(table))}>Numbers (CSV)</button>
      </p>
    </figure>
  );
}
