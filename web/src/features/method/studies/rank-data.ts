import { formatCount, formatNumber, narrowSpace } from '#shared/domain/format.ts';
import { coverageInterval } from '#shared/studies/coverage-rule.ts';
import type { RankStudy } from '#shared/studies/rank-study.ts';
import { cell, type ChartTable } from '#web/charts/chart-table.ts';
import type { ProportionRow } from '#web/charts/proportion-chart.tsx';

type Scenario = RankStudy['scenarios'][number];

const percent = (share: number): string => `${formatNumber(share * 100, 1)}${narrowSpace}%`;
const shareOf = ({ covered, boards }: Scenario): number => (boards > 0 ? covered / boards : 0);

/** Not below the level by more than three standard errors of a share counted over so many boards. */
export const holds = (scenario: Scenario, level: number): boolean => scenario.boards > 0 && shareOf(scenario) >= level - 3 * Math.sqrt((level * (1 - level)) / scenario.boards);

export const rankRows = ({ scenarios, level }: Pick<RankStudy, 'scenarios' | 'level'>): ProportionRow[] =>
  scenarios.map((s) => ({
    key: s.id,
    label: s.title,
    says: `${s.title}: all ranges held on ${percent(shareOf(s))} of ${formatCount(s.boards)} boards`,
    marks: [{ value: shareOf(s), ...coverageInterval(s.covered, s.boards), passed: holds(s, level) }],
    ...(holds(s, level) ? {} : { remark: 'too low' }),
  }));

export const rankTable = ({ scenarios, level }: Pick<RankStudy, 'scenarios' | 'level'>, caption: string): ChartTable => ({
  caption,
  columns: [
    { head: 'Scenario', csv: 'scenario' }, { head: 'Entries', csv: 'entries', numeric: true }, { head: 'Boards', csv: 'boards', numeric: true }, { head: 'All ranges held', csv: 'covered', numeric: true }, { head: '99 % Wilson', csv: 'coverage', numeric: true },
    { head: 'Ranks in a range, mean', csv: 'mean_width', numeric: true }, { head: 'Percentile ranks, not shown on boards', csv: 'percentile_covered', numeric: true }, { head: 'Verdict', csv: 'verdict' },
  ],
  rows: scenarios.map((s) => {
    const { low, high } = coverageInterval(s.covered, s.boards);
    return [
      cell(s.title), cell(formatCount(s.offsets.length), s.offsets.length), cell(formatCount(s.boards), s.boards), cell(percent(shareOf(s)), s.covered), cell(`${formatNumber(low * 100, 1)} to ${percent(high)}`, shareOf(s)),
      cell(formatNumber(s.meanWidth, 2), s.meanWidth), cell(s.boards > 0 ? percent(s.naiveCovered / s.boards) : 'none', s.naiveCovered), cell(holds(s, level) ? 'holds' : 'too low'),
    ];
  }),
});
