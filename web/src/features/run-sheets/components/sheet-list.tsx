import { Link } from 'react-router-dom';
import type { RunSheetView } from '#shared/contracts/run-sheets.ts';
import { EmptyState, type HeadingLevel } from '#web/components/blank-state.tsx';
import { ButtonLink } from '#web/components/button.tsx';
import { DataTable, type Column } from '#web/components/data-table.tsx';
import { When } from '#web/components/when.tsx';
import { formatCount } from '#shared/domain/format.ts';
import { circuitsOf, sheetState } from '../sheet-words.ts';

const columns: readonly Column<RunSheetView>[] = [
  { id: 'sheet', header: 'Run sheet', rowHeader: true, nowrap: true, cell: (s) => <Link to={`/desk/run-sheets/${s.id}`}>{s.id}</Link>, sortBy: (s) => s.id },
  { id: 'device', header: 'Device', cell: (s) => <><span className="nowrap">{s.device.name}</span>, {s.register.join(', ')}</>, sortBy: (s) => s.device.name },
  { id: 'class', header: 'Gate class', cell: (s) => s.gateClass.title, sortBy: (s) => s.gateClass.title },
  { id: 'circuits', header: 'Circuits', numeric: true, cell: (s) => formatCount(circuitsOf(s)?.all ?? s.circuitsAsked), sortBy: (s) => circuitsOf(s)?.all ?? s.circuitsAsked },
  { id: 'shots', header: 'Shots each', numeric: true, cell: (s) => formatCount(s.shots), sortBy: (s) => s.shots },
  { id: 'state', header: 'State', cell: (s) => (s.submission ? <>{sheetState(s)}, <Link className="nowrap" to={`/desk/submissions/${s.submission}`}>{s.submission}</Link></> : sheetState(s)), sortBy: sheetState },
  { id: 'made', header: 'Asked for', nowrap: true, cell: (s) => <When at={s.createdAt} />, sortBy: (s) => s.createdAt },
];

/** The run sheets of an organisation; without any, what to do first. `level` of the heading: 2 directly on a page. */
export function SheetList({ sheets, level = 3 }: { sheets: readonly RunSheetView[]; level?: HeadingLevel }) {
  if (sheets.length === 0) {
    return (
      <EmptyState level={level} title="No run sheet yet" act={<ButtonLink to="/desk/run-sheets/new">Plan a run sheet</ButtonLink>}>
        A run sheet lists the circuits to run on one device. It is the way to figures that are ranked.
      </EmptyState>
    );
  }
  return <DataTable caption="Run sheets" captionHidden columns={columns} rows={sheets} rowKey={(s) => s.id} />;
}
