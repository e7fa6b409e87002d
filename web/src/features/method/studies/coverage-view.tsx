import { useMemo, useState } from 'react';
import coverage from '#shared/studies/coverage.json' with { type: 'json' };
import { gateClassById } from '#shared/domain/gate-classes.ts';
import { formatCount } from '#shared/domain/format.ts';
import { ACCEPTED } from '#shared/studies/coverage-rule.ts';
import type { CoverageStudy } from '#shared/studies/coverage-study.ts';
import { ChartFrame } from '#web/charts/chart-frame.tsx';
import { ProportionChart } from '#web/charts/proportion-chart.tsx';
import { Select } from '#web/components/select.tsx';
import { coherentWords, coverageRows, coverageTable, figureOptions, judgedCells, levels } from './coverage-data.ts';
import { StudyNotes } from './study-notes.tsx';

const study = coverage as unknown as CoverageStudy;
const all = { value: '', label: 'All' };
const classes = [...new Set(study.cells.map((c) => c.gateClass))];
const opening = 'retained-signal/16';

const numbers = (values: readonly number[]): number[] => [...new Set(values)].sort((a, b) => a - b);

/** The coverage study as it is committed: one figure of one class at a time. */
export default function CoverageView() {
  const [gateClass, setGateClass] = useState(classes[0] ?? '');
  const [wanted, setFigure] = useState('');
  const [coherent, setCoherent] = useState('');
  const [shots, setShots] = useState('');
  const cells = study.cells.filter((c) => c.gateClass === gateClass);
  const options = useMemo(() => figureOptions(study, gateClass), [gateClass]);
  const figure = (options.find((o) => o.value === wanted) ?? options.find((o) => o.value.startsWith(opening)) ?? options[0])?.value ?? '';
  const judged = useMemo(() => judgedCells(study, { gateClass, figure, coherent: coherent === '' ? null : Number(coherent), shots: shots === '' ? null : Number(shots) }), [gateClass, figure, coherent, shots]);
  const rows = useMemo(() => coverageRows(judged), [judged]);
  const title = `${options.find((o) => o.value === figure)?.label ?? ''}: nominal against actual coverage`;
  const inside = judged.filter(({ verdict }) => verdict === 'inside').length;
  return (
    <div className="flow study">
      <div className="filters noprint">
        <Select label="Gate class" value={gateClass} options={classes.map((id) => ({ value: id, label: gateClassById(id)?.title ?? id }))} onChange={(e) => setGateClass(e.target.value)} />
        <Select label="Figure" value={figure} options={options} onChange={(e) => setFigure(e.target.value)} />
        <Select label="Coherent share" value={coherent} options={[all, ...numbers(cells.map((c) => c.coherent)).map((c) => ({ value: String(c), label: coherentWords(c) }))]} onChange={(e) => setCoherent(e.target.value)} />
        <Select label="Shots" value={shots} options={[all, ...numbers(cells.map((c) => c.shots)).map((s) => ({ value: String(s), label: formatCount(s) }))]} onChange={(e) => setShots(e.target.value)} />
      </div>
      {rows.length === 0 ? <p className="small quiet">No cell of the study matches all of these.</p> : (
        <ChartFrame title={title} quiet={`(${gateClassById(gateClass)?.title ?? gateClass})`} fileName={`evenbeam-coverage-${gateClass.replaceAll('/', '-')}`} table={coverageTable(judged, title)}
          says={`Each row is one cell of the study: the strength of noise (loss of the worst gate), its coherent share, the shots. The dots are the shares of trials in which the 50, 80 and 95 % intervals held the truth, with their 99 % Wilson intervals; upright lines are what they ought to be, the grey band what is accepted at 95 %. ${inside} of ${judged.length} cells lie inside; a cross marks one that does not, judged by the trials that settled. A cell inside the band is not thereby shown to be exact.`}>
          <ProportionChart label={title} rows={rows} nominal={levels} accepted={ACCEPTED} />
        </ChartFrame>
      )}
      <StudyNotes study={study} trials={study.cells.reduce((n, c) => n + c.trials, 0)} unit="trials" />
    </div>
  );
}
