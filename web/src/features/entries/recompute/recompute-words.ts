import { figureDecimals } from '#shared/domain/figure-words.ts';
import { formatCount, formatNumber, plural } from '#shared/domain/format.ts';
import { largestGap } from '#shared/recompute/differences.ts';
import type { ComparedFigure, Comparison, FileCheck } from '#shared/recompute/types.ts';
import type { RecomputeOutcome, RecomputeProgress } from './messages.ts';

const stages: Readonly<Record<RecomputeProgress['stage'], string>> = {
  files: 'Fetching dataset, seal and result.', checks: 'Checking the files against the record.', design: 'Writing out the design.', inverse: 'Inverting the design.',
  passes: 'Estimating.', replicates: 'Drawing replicates.', figures: 'Reading the figures.', comparison: 'Comparing.',
};

/** What the browser is doing just now, in one sentence. */
export const progressWords = ({ stage, replicatesDone, replicates }: RecomputeProgress): string =>
  stage === 'replicates' && replicatesDone !== null && replicates !== null ? `${formatCount(replicatesDone)} of ${formatCount(replicates)} replicates.` : stages[stage];

/** For the ear: stages, not every batch of replicates. */
export const progressAnnouncement = ({ stage }: RecomputeProgress): string => stages[stage];

/** 3e-12 as "3 × 10⁻¹²"; larger ones with their digits. */
export const gapWords = (gap: number): string => {
  if (gap >= 1e-4) return String(Number(gap.toPrecision(2)));
  const [digits = '', exponent = ''] = gap.toExponential(0).split('e');
  return `${digits} × 10${[...exponent.replace('+', '')].map((c) => '⁰¹²³⁴⁵⁶⁷⁸⁹'[Number(c)] ?? '⁻').join('')}`;
};

/** Digits at which a difference can be seen, never fewer than the figure has. */
export const decimalsOf = ({ frozen, differences }: ComparedFigure): number => {
  const gap = differences.find(({ pointer }) => pointer.endsWith('/value'))?.gap ?? null;
  const usual = figureDecimals(frozen);
  return gap === null || gap === 0 ? usual : Math.min(15, Math.max(usual, 1 - Math.floor(Math.log10(gap))));
};

export const valueWords = (value: number | null | undefined, decimals: number): string => (value === undefined ? 'missing' : value === null ? 'not determined' : formatNumber(value, decimals));

/** The last column of the table: none, how much, or where. */
export const differenceWords = ({ differences }: ComparedFigure): string => {
  if (differences.length === 0) return 'none';
  const value = differences.find(({ pointer }) => pointer.endsWith('/value'));
  const others = differences.length - (value ? 1 : 0);
  const most = largestGap(differences);
  const own = value ? (value.gap === null ? 'another answer' : gapWords(value.gap)) : 'none in the value';
  return others === 0 ? own : `${own}; ${others} other ${plural(others, 'number')} ${plural(others, 'differs', 'differ')}${most === null ? '' : `, by at most ${gapWords(most)}`}`;
};

export const secondsWords = (seconds: number): string => `${formatNumber(seconds, seconds < 10 ? 1 : 0)} seconds`;

const faultsOf = (checks: readonly FileCheck[]): FileCheck[] => checks.filter(({ outcome }) => outcome === 'differs');

export interface Verdict {
  kind: 'done' | 'caution' | 'fault';
  label: string;
  sentence: string;
}

const compared = ({ agreement, figures, parts, result, replicates }: Comparison): Omit<Verdict, 'kind'> & { kind: 'done' | 'fault' } => {
  const all = `${formatCount(figures.length)} figures`;
  if (agreement === 'identical') return { kind: 'done', label: 'Agrees', sentence: `Identical to the last digit: all ${all}, their intervals, the sealed check and every replicate.` };
  const unlike = [...figures, ...parts].filter((part) => part.agreement !== 'identical').length;
  if (agreement === 'close') return { kind: 'done', label: 'Agrees', sentence: `All ${all} agree to nine digits, but not to the last: ${unlike} of ${figures.length + parts.length} parts differ, by at most ${gapWords(Math.max(result.largestGap ?? 0, replicates.largestGap ?? 0))}. Another browser engine may round otherwise.` };
  const wrong = figures.filter((part) => part.agreement === 'differs').length;
  if (wrong > 0) return { kind: 'fault', label: 'Differs', sentence: `${wrong} of ${all} ${wrong === 1 ? 'differs' : 'differ'} from what was frozen.` };
  return { kind: 'fault', label: 'Differs', sentence: `All ${all} agree, but not everything else that was frozen with them.` };
};

/** The whole outcome in one plain sentence. */
export const verdictOf = ({ checks, comparison, seconds }: RecomputeOutcome): Verdict => {
  const faults = faultsOf(checks);
  const files = faults.length === 0 ? '' : ` ${faults.length === 1 ? 'A file does' : 'Files do'} not fit the record.`;
  if (!comparison) return { kind: 'fault', label: 'Not recomputed', sentence: `The files of this entry cannot be estimated from.${files}` };
  const { kind, label, sentence } = compared(comparison);
  const by = ` Recomputed by this browser in ${secondsWords(seconds)}.`;
  return faults.length > 0 ? { kind: 'fault', label: 'Differs', sentence: `${sentence}${files}${by}` } : { kind, label, sentence: `${sentence}${by}` };
};
