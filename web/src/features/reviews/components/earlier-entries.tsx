import { useMemo } from 'react';
import { Link } from 'react-router-dom';
import type { Review } from '#shared/contracts/reviews.ts';
import { decimalsFor, formatNumber, formatRange } from '#shared/domain/format.ts';
import { linearAxis } from '#web/charts/axis.ts';
import { AxisStrip } from '#web/charts/axis-strip.tsx';
import { BeamPlot } from '#web/charts/beam-plot.tsx';
import { tableRoles as r } from '#web/components/table-roles.ts';
import { When } from '#web/components/when.tsx';

interface Row {
  key: string;
  name: React.ReactNode;
  value: number | null;
  low95: number | null;
  high95: number | null;
}

const bar = (row: Row) => (row.low95 === null || row.high95 === null ? null : [{ level: 0.95, low: row.low95, high: row.high95 }]);
const numbers = (row: Row): string[] => {
  if (row.value === null || row.low95 === null || row.high95 === null) return ['not determined'];
  const decimals = decimalsFor((row.high95 - row.low95) / 3.92);
  return [formatNumber(row.value, decimals), formatRange(row.low95, row.high95, decimals)];
};

/** Retained signal at depth 16 of this dataset and of the device's earlier entries, on one axis. */
export function EarlierEntries({ earlier, submission }: Pick<Review, 'earlier' | 'submission'>) {
  const rows = useMemo((): Row[] => {
    const headline = submission.result?.figures.find((f) => f.key === 'retained-signal' && f.depth === 16);
    const wide = headline?.intervals?.find((i) => i.level === 0.95);
    return [
      { key: 'this', name: <b>This dataset</b>, value: headline?.value ?? null, low95: wide?.low ?? null, high95: wide?.high ?? null },
      ...earlier.map((e) => ({ key: `${e.accession}.${e.version}`, name: <><Link className="nowrap" to={`/entries/${e.accession}/v/${e.version}`}>{`${e.accession}.${e.version}`}</Link><span className="sub"><When at={e.frozenAt} /></span></>, value: e.value, low95: e.low95, high95: e.high95 })),
    ];
  }, [earlier, submission]);
  const axis = useMemo(() => linearAxis(rows.flatMap((row) => [row.value, row.low95, row.high95].filter((x) => x !== null)), { count: 4, pad: 0.15 }), [rows]);
  if (earlier.length === 0) return <p className="says">This is the first dataset of the device in this gate class.</p>;
  return (
    <table className="prev stack earlier" {...r.table}>
      <caption>Retained signal, depth 16 <span className="quiet">(the line is the 95{'\u202f'}% interval)</span></caption>
      <thead {...r.group}>
        <tr {...r.row}>
          <th {...r.columnHead} scope="col" className="p1">Entry</th>
          <th {...r.columnHead} scope="col" className="px"><span className="unseen">Drawn interval</span><AxisStrip axis={axis} side="top" /></th>
          <th {...r.columnHead} scope="col" className="p3">Estimate<span className="unit">95{'\u202f'}% interval</span></th>
        </tr>
      </thead>
      <tbody {...r.group}>
        {rows.map((row) => (
          <tr key={row.key} {...r.row}>
            <th {...r.rowHead} scope="row" className="row">{row.name}</th>
            <td {...r.cell} className="px"><div className="mini"><BeamPlot axis={axis} value={row.value} intervals={bar(row)} /></div></td>
            <td {...r.cell} className="p3">{numbers(row).map((text, i) => (i === 0 ? <b key={i}>{text}</b> : <span key={i} className="sub">{text}</span>))}</td>
          </tr>
        ))}
      </tbody>
    </table>
  );
}
