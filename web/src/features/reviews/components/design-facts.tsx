import type { Review } from '#shared/contracts/reviews.ts';
import { formatCount, formatNumber, formatSigned } from '#shared/domain/format.ts';
import { DataTable, type Column } from '#web/components/data-table.tsx';

type Patch = NonNullable<Review['submission']['result']>['patches'][number];
const yesNo = (holds: boolean): string => (holds ? 'yes' : 'no');

/** Rank, condition and fit of each patch: is the design what it should be? */
export function DesignFacts({ patches, register }: { patches: readonly Patch[]; register: readonly string[] }) {
  const columns: readonly Column<Patch>[] = [
    { id: 'qubits', header: 'Patch', rowHeader: true, cell: (p) => p.qubits.map((q) => register[q] ?? q).join(', ') },
    { id: 'rank', header: 'Rank', unit: 'of columns', numeric: true, cell: (p) => `${formatCount(p.rank)} of ${formatCount(p.columns)}` },
    { id: 'ratio', header: 'σᵣ/σ₁', unit: 'floor 0.01', numeric: true, cell: (p) => formatNumber(p.conditionRatio, 3) },
    { id: 'complete', header: 'Complete', cell: (p) => yesNo(p.complete) },
    { id: 'sound', header: 'Sound', cell: (p) => yesNo(p.sound) },
    { id: 'settled', header: 'Settled', cell: (p) => yesNo(p.settled) },
    { id: 'misfit', header: 'Misfit', unit: 'standard deviations', numeric: true, cell: (p) => (p.misfit ? formatSigned(p.misfit.sigmas, 2) : 'none') },
  ];
  return <DataTable tight caption="Design and fit of each patch" captionHidden columns={columns} rows={patches} rowKey={(p) => p.qubits.join('-')} />;
}

/** The sealed check in one sentence with its numbers. */
export function sealedSentence(sealed: NonNullable<Review['submission']['result']>['sealedCheck']): string {
  if (sealed === null) return 'No circuit of this dataset is sealed, so its prediction is not tested.';
  const n = (x: number): string => formatNumber(x, 4);
  return `On the sealed circuits the estimate is off by ${n(sealed.value)} in total variation distance; noise alone would give ${n(sealed.noise)}, and ${n(sealed.low99)} to ${n(sealed.high99)} in 99 of 100 cases. It ${sealed.passed ? 'passes' : 'does not pass'} (${formatSigned(sealed.z, 1)} standard deviations). The ideal device would be off by ${n(sealed.ideal)}.`;
}
