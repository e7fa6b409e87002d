import { DataTable, type Column } from '#web/components/data-table.tsx';
import type { FieldGroup, FieldRow } from '../schema-fields.ts';

const columns: readonly Column<FieldRow>[] = [
  { id: 'name', header: 'Field', rowHeader: true, nowrap: true, cell: (f) => <><code>{f.name}</code>{f.required ? null : <span className="sub">optional</span>}</> },
  { id: 'kind', header: 'Holds', cell: (f) => <>{f.kind}{f.limits ? <span className="sub">{f.limits}</span> : null}</> },
  { id: 'meaning', header: 'Meaning', cell: (f) => f.description },
];

/** The fields of one object of the format. */
export function FieldTable({ group }: { group: FieldGroup }) {
  return (
    <div className="fieldgroup" id={`field-${group.id}`}>
      <h3>{group.title}</h3>
      {group.description ? <p className="small quiet">{group.description}</p> : null}
      <DataTable caption={`Fields of ${group.title}`} captionHidden columns={columns} rows={group.rows} rowKey={(f) => f.name} tight />
    </div>
  );
}
