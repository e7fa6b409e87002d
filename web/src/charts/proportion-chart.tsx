import { useMemo } from 'react';
import { formatLevel } from '#shared/domain/format.ts';
import { linearAxis, type Axis } from './axis.ts';
import { MarkShape } from './mark-shape.tsx';
import { Points, type PlotPoint } from './points.tsx';
import { useElementWidth } from './use-element-width.ts';

/** A proportion with its interval; `passed` false is drawn as a cross. */
export interface ProportionMark {
  value: number;
  low: number;
  high: number;
  passed: boolean;
}

export interface ProportionRow {
  key: string;
  label: string;
  /** Read out when the row has the focus: all its numbers. */
  says: string;
  marks: readonly ProportionMark[];
  /** A word at the right end, where the row calls for one. */
  remark?: string;
}

interface ProportionChartProps {
  label: string;
  rows: readonly ProportionRow[];
  /** What the proportions ought to be: upright lines. */
  nominal: readonly number[];
  /** What is accepted of the greatest of them: a grey band. */
  accepted?: { from: number; to: number };
}

const head = 34;
/** Width of a letter of a row's name at the size of the labels, px: somewhat more than the mean. */
const letter = 6.7;
const percentAxis = (rows: readonly ProportionRow[], nominal: readonly number[], count: number): Axis => {
  const axis = linearAxis(rows.flatMap((row) => row.marks.flatMap((m) => [m.low, m.high])), { include: [...nominal, 1], count, pad: 0.02 });
  return { ...axis, ticks: axis.ticks.filter((t) => t.value <= 1 + 1e-9).map((t) => ({ ...t, label: formatLevel(t.value) })) };
};

/** Rows of proportions against what they ought to be. One row a case; its name stands above it where there is no room beside it. */
export function ProportionChart({ label, rows, nominal, accepted }: ProportionChartProps) {
  const [ref, width] = useElementWidth<HTMLDivElement>(760);
  const names = Math.max(250, ...rows.map((row) => row.label.length * letter + 16));
  // Names stand above their rows on a phone, and wherever they would take half of the drawing.
  const narrow = width < 620 || names > width / 2;
  const [left, right] = narrow ? [16, 74] : [names, 96];
  const rowHeight = narrow ? 42 : 25;
  const plot = Math.max(120, width - left - right);
  const height = head + rows.length * rowHeight + 10;
  const axis = useMemo(() => percentAxis(rows, nominal, narrow ? 4 : 7), [rows, nominal, narrow]);
  const x = (value: number): number => left + (axis.at(value) / 100) * plot;
  const y = (i: number): number => head + i * rowHeight + (narrow ? 29 : rowHeight / 2);
  const points: PlotPoint[] = rows.map((row, i) => ({
    key: row.key,
    label: row.says,
    draw: <g className="prop">{row.marks.map((m, j) => <g key={j}>
      <line className="propline" x1={x(m.low)} x2={x(m.high)} y1={y(i)} y2={y(i)} />
      <g transform={`translate(${x(m.value)} ${y(i)})`}>{m.passed ? <circle className="dot" r="3.5" /> : <MarkShape mark={5} size={4.5} />}</g>
    </g>)}<rect className="hit" x="0" width={width} y={y(i) - rowHeight / 2} height={rowHeight} /></g>,
  }));
  return (
    <div ref={ref} className="propchart plot-words">
      <svg width={width} height={height} role="group" aria-label={label}>
        <g aria-hidden="true">
          {accepted ? <rect className="b95" x={x(accepted.from)} width={x(accepted.to) - x(accepted.from)} y={head - 6} height={height - head} /> : null}
          <g className="grid">{axis.ticks.map((t) => <line key={t.value} x1={x(t.value)} x2={x(t.value)} y1={head - 6} y2={height - 6} />)}</g>
          {nominal.map((level) => <line key={level} className="zero" x1={x(level)} x2={x(level)} y1={head - 6} y2={height - 6} />)}
          {axis.ticks.map((t) => <text key={t.value} x={x(t.value)} y={head - 12} textAnchor="middle">{t.label}</text>)}
          {rows.map((row, i) => <text key={row.key} className="lab" x="0" y={narrow ? y(i) - 15 : y(i) + 4}>{row.label}</text>)}
          {rows.map((row, i) => (row.remark ? <text key={row.key} x={left + plot + 10} y={y(i) + 4}>{row.remark}</text> : null))}
        </g>
        <Points label={label} points={points} />
      </svg>
    </div>
  );
}
