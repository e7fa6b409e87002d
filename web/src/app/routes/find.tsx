import { useQuery, type QueryClient } from '@tanstack/react-query';
import { useSearchParams, type LoaderFunctionArgs } from 'react-router-dom';
import { formatCount, plural } from '#shared/domain/format.ts';
import { ButtonLink } from '#web/components/button.tsx';
import { EmptyState } from '#web/components/blank-state.tsx';
import { FindBox } from '#web/components/find-box.tsx';
import { PageHead } from '#web/components/page-head.tsx';
import { Read } from '#web/components/read.tsx';
import { Section } from '#web/components/section.tsx';
import { Wrap } from '#web/components/wrap.tsx';
import { entriesQuery } from '#web/features/entries/api/entries.ts';
import { EntryLines } from '#web/features/entries/components/entry-lines.tsx';

const wanted = (search: URLSearchParams) => ({ q: (search.get('q') ?? '').trim().slice(0, 80), limit: 50, ...(search.get('cursor') ? { cursor: search.get('cursor') ?? '' } : {}) });

export const loader = (queryClient: QueryClient) => ({ request }: LoaderFunctionArgs) => {
  const filter = wanted(new URL(request.url).searchParams);
  if (filter.q) void queryClient.prefetchQuery(entriesQuery(filter));
  return null;
};

/** Search over devices, providers and entry numbers. */
export function Component() {
  const [search] = useSearchParams();
  const filter = wanted(search);
  const query = useQuery({ ...entriesQuery(filter), enabled: filter.q !== '' });
  return (
    <Wrap>
      <PageHead title="Find" tab={filter.q ? `Find ${filter.q}` : 'Find'} slim><FindBox initial={filter.q} /></PageHead>
      {filter.q === '' ? null : (
        <Section title="Entries" aside={query.data ? `${formatCount(query.data.items.length)}${query.data.nextCursor ? ' and more' : ''} ${plural(query.data.items.length, 'entry', 'entries')} found.` : undefined}>
          <Read query={query} what="The search" loading={`Looking for ${filter.q}`}>
            {(list) => list.items.length === 0
              ? <EmptyState title={`Nothing found for “${filter.q}”`} act={<ButtonLink to="/boards">All boards</ButtonLink>}>Entries are found by the name of their device or provider, or by their number, such as EVB-000042.</EmptyState>
              : <><EntryLines items={list.items} />{list.nextCursor ? <p className="more"><ButtonLink to={`/find?${new URLSearchParams({ q: filter.q, cursor: list.nextCursor })}`}>Older entries</ButtonLink></p> : null}</>}
          </Read>
        </Section>
      )}
    </Wrap>
  );
}
