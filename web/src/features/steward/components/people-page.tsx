import { useQuery } from '@tanstack/react-query';
import type { PeopleOverview } from '#shared/contracts/office.ts';
import { capitalise } from '#shared/domain/format.ts';
import { DataTable, type Column } from '#web/components/data-table.tsx';
import { PageHead } from '#web/components/page-head.tsx';
import { Read } from '#web/components/read.tsx';
import { Section } from '#web/components/section.tsx';
import { When } from '#web/components/when.tsx';
import { Wrap } from '#web/components/wrap.tsx';
import { peopleQuery } from '../api/office.ts';

type Person = PeopleOverview['people'][number];
type Organisation = PeopleOverview['organisations'][number];
const kindWords: Readonly<Record<Organisation['kind'], string>> = { provider: 'Provider', laboratory: 'Laboratory', buyer: 'Buyer', registry: 'The registry' };

const people: readonly Column<Person>[] = [
  { id: 'name', header: 'Person', rowHeader: true, sortBy: (p) => p.name, cell: (p) => <>{p.name}<span className="sub">{p.email}</span></> },
  { id: 'organisations', header: 'Organisations', cell: (p) => p.memberships.map((m) => `${m.organisation} (${m.role})`).join(', ') || 'None' },
  { id: 'roles', header: 'Office', cell: (p) => capitalise(p.roles.join(', ')) || 'None' },
  { id: 'seen', header: 'Last sign-in', nowrap: true, sortBy: (p) => p.lastSignInAt, cell: (p) => (p.disabled ? 'Closed' : p.lastSignInAt ? <When at={p.lastSignInAt} exact /> : 'Never') },
];
const organisations: readonly Column<Organisation>[] = [
  { id: 'name', header: 'Organisation', rowHeader: true, sortBy: (o) => o.name, cell: (o) => o.name },
  { id: 'kind', header: 'Kind', sortBy: (o) => o.kind, cell: (o) => kindWords[o.kind] },
  { id: 'members', header: 'Members', numeric: true, sortBy: (o) => o.members, cell: (o) => o.members },
  { id: 'entries', header: 'Entries', numeric: true, sortBy: (o) => o.entries, cell: (o) => o.entries },
];

/** Who holds which office and belongs where, as it stands now. */
export function PeoplePage() {
  const query = useQuery(peopleQuery());
  return (
    <Wrap>
      <PageHead slim title="People and organisations" />
      <Read level={2} query={query} what="The list of people" loading="Loading the people" rows={8}>
        {(found) => (
          <>
            <Section title="People" aside="As they stand now"><DataTable caption="People with their offices" captionHidden columns={people} rows={found.people} rowKey={(p) => p.id} initialSort={{ id: 'name', desc: false }} /></Section>
            <Section title="Organisations"><DataTable caption="Organisations" captionHidden columns={organisations} rows={found.organisations} rowKey={(o) => o.id} initialSort={{ id: 'name', desc: false }} /></Section>
          </>
        )}
      </Read>
    </Wrap>
  );
}
