import { figureName } from '#shared/domain/figure-words.ts';
import { formatCount, formatLevel, formatNumber, narrowSpace } from '#shared/domain/format.ts';
import { coverageAccepted, coverageInterval, LEAST_TRIALS } from '#shared/studies/coverage-rule.ts';
import type { CoverageCell, CoverageFigure, CoverageStudy } from '#shared/studies/coverage-study.ts';
import { cell, type ChartTable } from '#web/charts/chart-table.ts';
import type { ProportionRow } from '#web/charts/proportion-chart.tsx';

export const levels = [0.5, 0.8, 0.95] as const;

/** Name of one figure among those of a class: key, depth, gate and qubits. */
const idOf = (f: CoverageFigure): string => [f.key, f.depth ?? '', f.gate ?? '', f.gate === null ? f.qubits.join('-') : ''].join('/');

const wordsOf = (f: CoverageFigure, registerSize: number): string => {
  const part = f.gate === null && f.qubits.length < registerSize ? `, qubit ${f.qubits.join(', ')}` : '';
  if (f.key === 'prediction') return `Predicted probability, circuits of length ${f.depth}`;
  return figureName({ key: f.key, depth: f.depth, gate: f.gate }, f.gate === 'id' ? 'identity' : (f.gate ?? undefined)) + part;
};

const cellsOf = (study: Pick<CoverageStudy, 'cells'>, gateClass: string): CoverageCell[] => study.cells.filter((c) => c.gateClass === gateClass);

/** Figures that the study has of a class, in the order of a result. */
export const figureOptions = (study: Pick<CoverageStudy, 'cells'>, gateClass: string): { value: string; label: string }[] => {
  const figures = cellsOf(study, gateClass).flatMap((c) => c.figures);
  const size = Math.max(1, ...figures.map((f) => f.qubits.length));
  return [...new Map(figures.map((f) => [idOf(f), wordsOf(f, size)])).entries()].map(([value, label]) => ({ value, label }));
};

export const coherentWords = (share: number): string => (share === 0 ? 'stochastic' : share === 1 ? 'coherent' : share === 0.5 ? 'half coherent' : `${formatLevel(share)} coherent`);
const noiseWords = (noise: number): string => `${Number((noise * 100).toPrecision(6))}${narrowSpace}%`;

export interface CoverageFilter {
  gateClass: string;
  figure: string;
  /** Null = all. */
  coherent: number | null;
  shots: number | null;
}

/** Inside the domain, outside it, or too few trials to say. */
export type Verdict = 'inside' | 'outside' | 'too few trials';

interface Judged {
  cell: CoverageCell;
  figure: CoverageFigure;
  verdict: Verdict;
}

/** The cells asked for that have the figure, quietest first; each judged by its settled trials, as the domain is. */
export const judgedCells = (study: Pick<CoverageStudy, 'cells'>, filter: CoverageFilter): Judged[] =>
  cellsOf(study, filter.gateClass)
    .filter((c) => (filter.coherent === null || c.coherent === filter.coherent) && (filter.shots === null || c.shots === filter.shots))
    .sort((a, b) => a.shots - b.shots || a.noise - b.noise || a.coherent - b.coherent)
    .flatMap((c) => {
      const figure = c.figures.find((f) => idOf(f) === filter.figure);
      if (!figure || figure.trials === 0) return [];
      const [trials, inside] = figure.settled;
      const verdict = trials < LEAST_TRIALS ? 'too few trials' : coverageAccepted(inside, trials) ? 'inside' : 'outside';
      return [{ cell: c, figure, verdict }];
    });

const percent = (share: number): string => `${formatNumber(share * 100, 1)}${narrowSpace}%`;
const range = (inside: number, trials: number): string => {
  const { low, high } = coverageInterval(inside, trials);
  return `${formatNumber(low * 100, 1)} to ${percent(high)}`;
};

/** Rows of the chart: 50, 80 and 95 % as counted over all trials; the last is a cross where the cell lies outside. */
export const coverageRows = (judged: readonly Judged[]): ProportionRow[] =>
  judged.map(({ cell: c, figure, verdict }) => {
    const label = `${noiseWords(c.noise)}, ${coherentWords(c.coherent)}, ${formatCount(c.shots)} shots`;
    return {
      key: `${c.noise}/${c.coherent}/${c.shots}`,
      label,
      says: `${label}: ${levels.map((level, i) => `${formatLevel(level)} intervals held the truth in ${percent(figure.inside[i]! / figure.trials)} of ${formatCount(figure.trials)} trials`).join('; ')}; ${verdict}`,
      marks: figure.inside.map((inside, i) => ({ value: inside / figure.trials, ...coverageInterval(inside, figure.trials), passed: levels[i] !== 0.95 || verdict !== 'outside' })),
      ...(verdict === 'inside' ? {} : { remark: verdict === 'outside' ? 'outside' : 'few trials' }),
    };
  });

/** The same numbers, with those of settled trials alone and the verdict. */
export const coverageTable = (judged: readonly Judged[], caption: string): ChartTable => ({
  caption,
  columns: [
    { head: 'Noise', csv: 'noise', numeric: true }, { head: 'Coherent share', csv: 'coherent_share' }, { head: 'Shots', csv: 'shots', numeric: true }, { head: 'Trials', csv: 'trials', numeric: true },
    ...levels.flatMap((level) => [{ head: `At ${formatLevel(level)}`, csv: `inside_${level * 100}`, numeric: true }, { head: '99 % Wilson', csv: `coverage_${level * 100}`, numeric: true }]),
    { head: 'Settled', csv: 'settled', numeric: true }, { head: 'At 95 %, settled', csv: 'settled_inside_95', numeric: true }, { head: 'Domain', csv: 'domain' },
  ],
  rows: judged.map(({ cell: c, figure, verdict }) => [
    cell(noiseWords(c.noise), c.noise), cell(coherentWords(c.coherent), c.coherent), cell(formatCount(c.shots), c.shots), cell(formatCount(figure.trials), figure.trials),
    ...figure.inside.flatMap((inside) => [cell(percent(inside / figure.trials), inside), cell(range(inside, figure.trials), inside / figure.trials)]),
    cell(formatCount(figure.settled[0]), figure.settled[0]), cell(figure.settled[0] > 0 ? percent(figure.settled[1] / figure.settled[0]) : 'none', figure.settled[1]), cell(verdict),
  ]),
});
