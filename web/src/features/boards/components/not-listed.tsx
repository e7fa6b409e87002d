import type { Board } from '#shared/contracts/boards.ts';
import { formatCount, plural } from '#shared/domain/format.ts';
import { AccessionLink } from '#web/components/accession-link.tsx';
import { DataTable, type Column } from '#web/components/data-table.tsx';
import { DemoTag } from '#web/components/demo.tsx';
import { Section } from '#web/components/section.tsx';

type Left = Board['notListed'][number];

const columns: readonly Column<Left>[] = [
  { id: 'device', header: 'Device', rowHeader: true, cell: ({ row }) => <><span className="nowrap">{row.device.name}</span><span className="sub">{row.device.provider.name}{row.demo ? <>; <DemoTag /></> : null}</span></> },
  { id: 'entry', header: 'Entry', nowrap: true, cell: ({ row }) => <AccessionLink accession={row.accession} version={row.version} /> },
  { id: 'reason', header: 'Reason', cell: ({ reasons }) => <Lines of={reasons.map((r) => r.sentence)} /> },
  { id: 'remedy', header: 'What would change it', cell: ({ reasons }) => <Lines of={[...new Set(reasons.map((r) => r.remedy))]} /> },
];

function Lines({ of: lines }: { of: readonly string[] }) {
  return lines.length === 1 ? <>{lines[0]}</> : <span className="lines">{lines.map((line) => <span key={line}>{line}</span>)}</span>;
}

/** Public and citable, but not taken on equal terms: each with its reason and what would change it. */
export function NotListed({ items }: { items: readonly Left[] }) {
  if (items.length === 0) return null;
  return (
    <Section title="Not listed" aside={`${formatCount(items.length)} ${plural(items.length, 'entry', 'entries')}`} className="flow">
      <p className="prose">These entries are public and can be cited. They are left off the board because they were not taken on equal terms, and each reason is given.</p>
      <DataTable caption="Entries that are not listed, with the reason" captionHidden columns={columns} rows={items} rowKey={({ row }) => row.accession} tight />
    </Section>
  );
}
