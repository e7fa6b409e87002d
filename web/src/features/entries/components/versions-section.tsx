import { Link } from 'react-router-dom';
import type { Entry } from '#shared/contracts/entries.ts';
import { columnDecimals, figureRange, figureValue } from '#shared/domain/figure-words.ts';
import { formatDate } from '#shared/domain/format-date.ts';
import { versionedAccessionOf } from '#shared/domain/ids.ts';
import { AccessionLink } from '#web/components/accession-link.tsx';
import { DataTable, type Column } from '#web/components/data-table.tsx';
import { Section } from '#web/components/section.tsx';
import { useMe } from '#web/lib/me.ts';
import { MethodResults } from './method-results.tsx';

type Version = Entry['versions'][number];
const stateWords: Readonly<Record<Version['state'], string>> = { frozen: 'Current', superseded: 'Superseded', withdrawn: 'Withdrawn' };

export function VersionsSection({ entry }: { entry: Entry }) {
  const me = useMe();
  const decimals = columnDecimals(entry.versions.flatMap((v) => (v.headline ? [v.headline] : [])));
  const columns: Column<Version>[] = [
    { id: 'version', header: 'Version', rowHeader: true, nowrap: true, cell: (v) => (v.version === entry.version ? versionedAccessionOf(entry.accession, v.version) : <AccessionLink accession={entry.accession} version={v.version} />) },
    { id: 'frozen', header: 'Frozen', nowrap: true, cell: (v) => formatDate(v.frozenAt) },
    { id: 'method', header: 'Method', cell: (v) => v.method },
    { id: 'headline', header: 'Retained signal, depth 16', numeric: true, cell: (v) => (v.headline ? `${figureValue(v.headline, decimals)} (${figureRange(v.headline, 0.95, decimals) ?? 'no interval'})` : 'Not determined') },
    { id: 'state', header: 'State', cell: (v) => `${stateWords[v.state]}${v.version === entry.version ? '; you are reading it' : ''}` },
  ];
  return (
    <Section title="Versions">
      <DataTable caption="Versions of this entry" captionHidden columns={columns} rows={entry.versions} rowKey={(v) => String(v.version)} tight />
      {me?.curator && entry.state !== 'withdrawn' ? <p className="small"><Link to={`/review/withdrawals?entry=${versionedAccessionOf(entry.accession, entry.version)}`}>Ask for the withdrawal of this version</Link></p> : null}
      <MethodResults accession={entry.accession} version={entry.version} />
    </Section>
  );
}
