import { useMemo } from 'react';
import type { Entry } from '#shared/contracts/entries.ts';
import { figureName } from '#shared/domain/figure-words.ts';
import { formatCount, plural } from '#shared/domain/format.ts';
import type { ComparedFigure, Comparison, FileCheck } from '#shared/recompute/types.ts';
import { DataTable, type Column } from '#web/components/data-table.tsx';
import { gateWords, qubitNames } from '../entry-words.ts';
import { decimalsOf, differenceWords, gapWords, valueWords } from '../recompute/recompute-words.ts';

const keyOf = ({ frozen: f }: ComparedFigure): string => `${f.key}-${f.depth}-${f.gate}-${f.qubits.join('.')}`;

/** Every figure as frozen and as recomputed, with the difference of the two. */
export function RecomputedFigures({ entry, comparison }: { entry: Entry; comparison: Comparison }) {
  const columns = useMemo((): Column<ComparedFigure>[] => [
    { id: 'figure', header: 'Figure', rowHeader: true, cell: ({ frozen: f }) => figureName(f, f.gate === null ? undefined : gateWords(entry, f.gate)) },
    ...(entry.register.length > 1 ? [{ id: 'qubits', header: 'Qubits', cell: ({ frozen }: ComparedFigure) => qubitNames(entry, frozen.qubits) }] : []),
    { id: 'frozen', header: 'Frozen', numeric: true, cell: (row) => valueWords(row.frozen.value, decimalsOf(row)) },
    { id: 'again', header: 'Recomputed', numeric: true, cell: (row) => valueWords(row.again === null ? undefined : row.again.value, decimalsOf(row)) },
    { id: 'difference', header: 'Difference', numeric: true, cell: differenceWords },
  ], [entry]);
  const count = `${formatCount(comparison.figures.length)} ${plural(comparison.figures.length, 'figure')}`;
  return (
    <details className="allfigures" open>
      <summary>{count}, frozen and recomputed</summary>
      <DataTable caption={`${entry.accession}.${entry.version}: each figure as frozen and as this browser recomputed it`} captionHidden columns={columns} rows={comparison.figures} rowKey={keyOf} tight stack={false}
        rowClass={({ agreement }) => (agreement === 'differs' ? 'unlike' : undefined)} />
    </details>
  );
}

interface Line {
  id: string;
  title: string;
  outcome: 'agrees' | 'differs' | 'left-out';
  detail: string;
}

const outcomeWords: Readonly<Record<Line['outcome'], string>> = { agrees: 'Agrees', differs: 'Differs', 'left-out': 'Nothing to compare' };

const linesOf = (checks: readonly FileCheck[], comparison: Comparison | null): Line[] => [
  ...checks,
  ...(comparison ? [
    ...comparison.parts.map(({ title, agreement, differences }): Line => ({
      id: title, title, outcome: agreement === 'differs' ? 'differs' : 'agrees',
      detail: agreement === 'identical' ? 'identical' : agreement === 'close' ? 'to nine digits' : `${differences.length} ${plural(differences.length, 'place')}, first ${differences[0]?.pointer ?? ''}`,
    })),
    ...([['result', 'canonical bytes of the recomputed result', comparison.result], ['replicates', 'recomputed replicates', comparison.replicates]] as const).map(([id, title, part]): Line => ({
      id, title, outcome: part.agreement === 'differs' ? 'differs' : 'agrees',
      detail: part.agreement === 'identical' ? part.againSha256 : `recorded ${part.frozenSha256}, recomputed ${part.againSha256}${part.largestGap === null ? '' : `, largest difference ${gapWords(part.largestGap)}`}`,
    })),
  ] : []),
];

const lineColumns: Column<Line>[] = [
  { id: 'what', header: 'What', rowHeader: true, cell: ({ title }) => title.charAt(0).toUpperCase() + title.slice(1) },
  { id: 'outcome', header: 'Outcome', nowrap: true, cell: ({ outcome }) => outcomeWords[outcome] },
  { id: 'detail', header: 'Detail', cell: ({ detail }) => (/^[0-9a-f]{64}$/.test(detail) ? <span className="hash">{detail}</span> : <span className="anywhere">{detail}</span>) },
];

/** Files, digests, seal and the parts of the result that are no figures. Open where something differs. */
export function RecomputedRecord({ checks, comparison }: { checks: readonly FileCheck[]; comparison: Comparison | null }) {
  const lines = linesOf(checks, comparison);
  return (
    <details className="allfigures" open={lines.some(({ outcome }) => outcome === 'differs')}>
      <summary>Files, digests, seal and the rest of the result</summary>
      <DataTable caption="What else was compared" captionHidden columns={lineColumns} rows={lines} rowKey={({ id }) => id} tight rowClass={({ outcome }) => (outcome === 'differs' ? 'unlike' : undefined)} />
    </details>
  );
}
