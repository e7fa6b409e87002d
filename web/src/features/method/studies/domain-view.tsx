import { useState } from 'react';
import coverage from '#shared/studies/coverage.json' with { type: 'json' };
import { figureDomains } from '#shared/domain/figure-domains.ts';
import { studiedClassOf } from '#shared/domain/figure-domain.ts';
import { gateClasses } from '#shared/domain/gate-classes.ts';
import type { CoverageStudy } from '#shared/studies/coverage-study.ts';
import { DataTable, type Column } from '#web/components/data-table.tsx';
import { Select } from '#web/components/select.tsx';
import { domainRows, type DomainRow } from './domain-data.ts';

const ranked = gateClasses.filter((c) => c.ranked);
const columns: readonly Column<DomainRow>[] = [
  { id: 'figure', header: 'Figure', rowHeader: true, cell: (row) => row.figure },
  { id: 'shots', header: 'Shots of a circuit', cell: (row) => row.shots },
  { id: 'loss', header: 'Loss of the worst gate', cell: (row) => row.loss ?? <span className="undetermined">not shown to hold anywhere</span> },
];

/** The domain of every figure of one class, as boards apply it. */
export default function DomainView() {
  const [gateClass, setGateClass] = useState(ranked[0]?.id ?? '');
  const studied = studiedClassOf(gateClass);
  const title = ranked.find((c) => c.id === gateClass)?.title ?? gateClass;
  return (
    <div className="flow study">
      <div className="filters noprint"><Select label="Gate class" value={gateClass} options={ranked.map((c) => ({ value: c.id, label: c.title }))} onChange={(e) => setGateClass(e.target.value)} /></div>
      {studied === gateClass ? null : <p className="small quiet">This class was not simulated itself; it takes the domain of <code>{studied}</code>.</p>}
      <div className="ranktable"><DataTable tight caption={`Domain of every figure: ${title}`} columns={columns} rows={domainRows(figureDomains, coverage as unknown as CoverageStudy, gateClass, studied)} rowKey={(row) => row.key} /></div>
    </div>
  );
}
