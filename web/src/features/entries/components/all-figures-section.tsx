import { useMemo } from 'react';
import { Link } from 'react-router-dom';
import type { Entry } from '#shared/contracts/entries.ts';
import { figureDecimals, figureName, figureRange, figureValue } from '#shared/domain/figure-words.ts';
import { formatCount, formatNumber } from '#shared/domain/format.ts';
import { DataTable, type Column } from '#web/components/data-table.tsx';
import { Section } from '#web/components/section.tsx';
import { gateWords, qubitNames } from '../entry-words.ts';

type EntryFigure = Entry['figures'][number];

const remarks = (f: EntryFigure): string => [f.value === null ? (f.reason ?? 'not determined') : '', f.extrapolated ? 'extrapolated' : '', f.firstOrderOnly ? 'first order only' : ''].filter(Boolean).join('; ');

/** Every published figure with all its levels, the single pass and the number of replicates. */
export function AllFiguresSection({ entry }: { entry: Entry }) {
  const columns = useMemo((): Column<EntryFigure>[] => [
    { id: 'figure', header: 'Figure', rowHeader: true, cell: (f) => figureName(f, f.gate === null ? undefined : gateWords(entry, f.gate)) },
    ...(entry.register.length > 1 ? [{ id: 'qubits', header: 'Qubits', cell: (f: EntryFigure) => qubitNames(entry, f.qubits) }] : []),
    { id: 'estimate', header: 'Estimate', numeric: true, cell: (f) => figureValue(f) },
    { id: 'se', header: 'Standard error', numeric: true, cell: (f) => (f.standardError === null ? '' : formatNumber(f.standardError, figureDecimals(f))) },
    ...[0.5, 0.8, 0.95].map((level): Column<EntryFigure> => ({ id: `i${level}`, header: `${level * 100} % interval`, numeric: true, cell: (f) => figureRange(f, level) ?? '' })),
    { id: 'pass', header: 'Single pass', numeric: true, cell: (f) => (f.firstOrder === null ? '' : formatNumber(f.firstOrder, figureDecimals(f))) },
    { id: 'replicates', header: 'Replicates', numeric: true, cell: (f) => (f.value === null ? '' : formatCount(f.replicates)) },
    { id: 'remarks', header: 'Remarks', cell: remarks },
  ], [entry]);
  return (
    <Section title="All figures" aside={<>{`Method ${entry.method}, ${formatCount(entry.replicates)} bootstrap replicates.`} <Link to="/method#figures">What each figure is</Link></>}>
      <details className="allfigures">
        <summary>{formatCount(entry.figures.length)} figures with every interval</summary>
        <DataTable caption={`Every figure of ${entry.accession}.${entry.version}`} captionHidden columns={columns} rows={entry.figures} rowKey={(f) => `${f.key}-${f.depth}-${f.gate}-${f.qubits.join('.')}`} tight stack={false} />
      </details>
    </Section>
  );
}
