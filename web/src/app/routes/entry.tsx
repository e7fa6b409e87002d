import { useQuery, type QueryClient } from '@tanstack/react-query';
import { Link, useParams, type LoaderFunctionArgs } from 'react-router-dom';
import { EmptyState } from '#web/components/blank-state.tsx';
import { PageHead } from '#web/components/page-head.tsx';
import { Read } from '#web/components/read.tsx';
import { Wrap } from '#web/components/wrap.tsx';
import { entryQuery } from '#web/features/entries/api/entries.ts';
import { EntryPage } from '#web/features/entries/components/entry-page.tsx';

/** /entries/:accession is the newest version, /entries/:accession/v/:n one version for ever. */
const asked = (params: Readonly<Record<string, string | undefined>>) => {
  const version = Number(params.n);
  return entryQuery(params.accession ?? '', Number.isInteger(version) && version > 0 ? version : null);
};

export const loader = (queryClient: QueryClient) => ({ params }: LoaderFunctionArgs) => {
  void queryClient.prefetchQuery(asked(params));
  return null;
};

export function Component() {
  const params = useParams();
  const query = useQuery(asked(params));
  if (query.data) return <EntryPage entry={query.data} />;
  return (
    <Wrap>
      <PageHead title={params.accession ?? 'Entry'} />
      <Read level={2} query={query} what="The entry" loading="Loading the entry" rows={6}
        missing={<EmptyState level={2} title="There is no such entry" act={<Link className="btn" to="/find">Find a device, provider or entry</Link>}>{query.error?.message ?? ''}</EmptyState>}>
        {() => null}
      </Read>
    </Wrap>
  );
}
