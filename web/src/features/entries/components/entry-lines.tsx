import { Link } from 'react-router-dom';
import type { EntryItem } from '#shared/contracts/entries.ts';
import { formatDate } from '#shared/domain/format-date.ts';
import { AccessionLink, entryPath, nameClass } from '#web/components/accession-link.tsx';
import { DemoTag } from '#web/components/demo.tsx';

/** Entries one a line: device, provider, gate class, number, date of freezing. */
export function EntryLines({ items }: { items: readonly EntryItem[] }) {
  return (
    <ul className="newest">
      {items.map((item) => (
        <li key={`${item.accession}.${item.version}`}>
          <Link className={nameClass(item.device.name)} to={entryPath(item.accession, item.version)}>{item.device.name}</Link>
          <span>{item.device.provider.name}</span>
          <span className="quiet">{item.gateClassTitle}{item.state === 'frozen' ? '' : `, ${item.state}`}{item.demo ? <>; <DemoTag /></> : null}</span>
          <span className="nowrap"><AccessionLink accession={item.accession} version={item.version} /></span>
          <span className="quiet nowrap">{formatDate(item.frozenAt)}</span>
        </li>
      ))}
    </ul>
  );
}
