import { useQuery } from '@tanstack/react-query';
import { DataTable, type Column } from '#web/components/data-table.tsx';
import { Message } from '#web/components/message.tsx';
import { asApiError } from '#web/lib/api-error.ts';
import { versionResultsQuery } from '../api/entries.ts';
import { methodLines, type MethodLine } from '../method-differences.ts';

const columns: readonly Column<MethodLine>[] = [
  { id: 'method', header: 'Method', rowHeader: true, cell: (l) => <>{l.method}<span className="sub">{l.standing}</span></> },
  { id: 'value', header: 'Retained signal, depth 16', numeric: true, cell: (l) => l.value },
  { id: 'interval', header: '95 % interval', numeric: true, cell: (l) => l.interval },
  { id: 'difference', header: 'From the frozen figure', cell: (l) => l.difference ?? 'None' },
  { id: 'settled', header: 'Passes settled', cell: (l) => l.settled },
  { id: 'file', header: 'Result', cell: (l) => <a href={l.links.result} aria-label={`Result by ${l.method}`}>JSON</a> },
];

/** What other method versions make of the same counts; there only where there is a result by one. */
export function MethodResults({ accession, version }: { accession: string; version: number }) {
  const query = useQuery(versionResultsQuery(accession, version));
  if (query.isError) return <Message kind="fault">{`The results by other method versions could not be read. ${asApiError(query.error).message}`}</Message>;
  const lines = methodLines(query.data?.items ?? []);
  if (lines.length < 2) return null;
  return (
    <div className="after flow">
      <h3>Other method versions</h3>
      <p className="prose">The same counts and seal, estimated again. The frozen figure is the registry’s; the others were added beside it and are never ranked. All share their counts, so overlapping intervals say nothing about the difference.</p>
      <DataTable caption="Retained signal at depth 16 by method version" captionHidden columns={columns} rows={lines} rowKey={(l) => l.method} tight />
    </div>
  );
}
