import type { Agreement, ComparedFigure, ComparedPart, Comparison, Difference, FileCheck } from '#shared/recompute/types.ts';

const words: Readonly<Record<Agreement | FileCheck['outcome'], string>> = { agrees: 'agrees', identical: 'agrees', close: 'agrees', differs: 'DIFFERS', 'left-out': 'note' };
const line = (outcome: Agreement | FileCheck['outcome'], title: string, detail: string): string => `${words[outcome].padEnd(8)} ${title}: ${detail}`;

export const checkLine = ({ outcome, title, detail }: FileCheck): string => line(outcome, title, detail);

/** Differences written out; the rest is counted. */
const mostShown = 4;
const shown = (value: unknown): string => {
  const text = value === undefined ? 'nothing' : JSON.stringify(value);
  return text.length > 60 ? `${text.slice(0, 60)}…` : text;
};
/** The value itself first, then in the order of the file. */
const told = (differences: readonly Difference[]): string =>
  [...[...differences].sort((a, b) => Number(b.pointer.endsWith('/value')) - Number(a.pointer.endsWith('/value'))).slice(0, mostShown).map(({ pointer, frozen, again }) => `${pointer} frozen ${shown(frozen)}, recomputed ${shown(again)}`), ...(differences.length > mostShown ? [`and ${differences.length - mostShown} more places`] : [])].join('; ');

const partLine = ({ title, agreement, differences }: ComparedPart): string => line(agreement, title, agreement === 'identical' ? 'identical' : agreement === 'close' ? 'within 1e-9' : told(differences));

const figureLine = (figure: ComparedFigure): string => {
  const { frozen, agreement, title, differences } = figure;
  const value = frozen.value === null ? 'not determined' : String(frozen.value);
  if (agreement === 'differs') return line('differs', title, told(differences));
  return line(agreement, title, `${value}, ${frozen.intervals ? 'intervals too, ' : ''}${agreement === 'identical' ? 'identical' : 'within 1e-9'}`);
};

/** One line for each figure, each other part, the canonical bytes and the replicates. */
export function comparisonLines({ figures, parts, result, replicates }: Comparison): string[] {
  const gap = (most: number | null): string => (most === null ? '' : `, largest difference ${most.toExponential(1)}`);
  return [
    ...figures.map(figureLine), ...parts.map(partLine),
    line(result.agreement, 'canonical bytes of the recomputed result', result.agreement === 'identical' ? result.againSha256 : `recorded ${result.frozenSha256}, recomputed ${result.againSha256}${gap(result.largestGap)}`),
    line(replicates.agreement, 'replicates', replicates.agreement === 'identical' ? replicates.againSha256 : `recorded ${replicates.frozenSha256}, recomputed ${replicates.againSha256}${gap(replicates.largestGap)}`),
  ];
}
