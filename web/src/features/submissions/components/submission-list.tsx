import { Link } from 'react-router-dom';
import type { SubmissionItem } from '#shared/contracts/submissions.ts';
import { stateWords } from '#shared/domain/life-cycle.ts';
import { formatLevel } from '#shared/domain/format.ts';
import { EmptyState, type HeadingLevel } from '#web/components/blank-state.tsx';
import { ButtonLink } from '#web/components/button.tsx';
import { DataTable, type Column } from '#web/components/data-table.tsx';
import { When } from '#web/components/when.tsx';

const stateOf = ({ state, progress }: SubmissionItem): string => (state === 'checking' ? `${stateWords[state]}, ${formatLevel(Math.round(progress * 100) / 100)}` : stateWords[state]);

const columns: readonly Column<SubmissionItem>[] = [
  { id: 'title', header: 'Submission', rowHeader: true, cell: (s) => <><Link to={`/desk/submissions/${s.id}`}>{s.title}</Link><span className="sub">{s.id}</span></>, sortBy: (s) => s.title },
  { id: 'device', header: 'Device', nowrap: true, cell: (s) => s.device?.name ?? 'not yet known', sortBy: (s) => s.device?.name ?? null },
  { id: 'class', header: 'Gate class', cell: (s) => s.gateClass?.title ?? 'of its own', sortBy: (s) => s.gateClass?.title ?? null },
  { id: 'sheet', header: 'Run sheet', nowrap: true, cell: (s) => (s.runSheet ? <Link to={`/desk/run-sheets/${s.runSheet}`}>{s.runSheet}</Link> : 'none'), sortBy: (s) => s.runSheet },
  { id: 'state', header: 'State', cell: stateOf, sortBy: stateOf },
  { id: 'changed', header: 'Last moved', nowrap: true, cell: (s) => <When at={s.changedAt} />, sortBy: (s) => s.changedAt },
];

/** The submissions of an organisation; without any, what to do first. `level` of the heading: 2 directly on a page. */
export function SubmissionList({ submissions, level = 3 }: { submissions: readonly SubmissionItem[]; level?: HeadingLevel }) {
  if (submissions.length === 0) {
    return (
      <EmptyState level={level} title="Nothing submitted yet" act={<ButtonLink to="/desk/submissions/new">Submit a dataset</ButtonLink>}>
        Run the circuits of a run sheet on the device and put the raw counts in one file. The file is checked in this browser before anything is sent.
      </EmptyState>
    );
  }
  return <DataTable caption="Submissions" captionHidden columns={columns} rows={submissions} rowKey={(s) => s.id} />;
}
