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

/** A sentence whose accessions do not break across lines. */
const unbroken = (sentence: string) => sentence.split(/(EVB-\d+(?:\.\d+)?)/).map((part, i) => (i % 2 === 1 ? <span key={part} className="nowrap">{part}</span> : part));

function Lines({ of: lines }: { of: readonly string[] }) {
  return lines.length === 1 ? <>{unbroken(lines[0] ?? '')}</> : <span className="lines">{lines.map((line) => <span key={line}>{unbroken(line)}</span>)}</span>;
}

/** Left off for no other reason than that the device has a newer entry. */
const onlyEarlier = ({ reasons }: Left): boolean => reasons.every(({ code }) => code === 'newer');

const keyOf = ({ row }: Left): string => row.accession;
const countOf = (items: readonly Left[]): string => `${formatCount(items.length)} ${plural(items.length, 'entry', 'entries')}`;

/** Public and citable, but not on the board: first those not taken on equal terms, each with its reason; folded away below, the earlier entries of devices that have a newer one. */
export function NotListed({ items }: { items: readonly Left[] }) {
  const earlier = items.filter(onlyEarlier);
  const unequal = items.filter((item) => !onlyEarlier(item));
  if (items.length === 0) return null;
  return (
    <Section title="Not ranked" aside={countOf(items)} className="flow">
      {unequal.length > 0 ? (
        <>
          <p className="prose">These entries are public and can be cited. They were not taken on equal terms and take no part in the ranking; each reason is given.</p>
          <DataTable caption="Entries that are not ranked, with the reason" captionHidden columns={columns} rows={unequal} rowKey={keyOf} tight />
        </>
      ) : null}
      {earlier.length > 0 ? (
        <details className="earlier">
          <summary>Earlier entries of devices that have a newer one: {countOf(earlier)}</summary>
          <DataTable caption="Earlier entries, each with the newer one that stands in its place" captionHidden columns={columns.slice(0, 3)} rows={earlier} rowKey={keyOf} tight />
        </details>
      ) : null}
    </Section>
  );
}
