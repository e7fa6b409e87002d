import { keepPreviousData, useQuery, type QueryClient } from '@tanstack/react-query';
import { Link, useParams, useSearchParams, type LoaderFunctionArgs } from 'react-router-dom';
import { boardReadings } from '#shared/domain/board-figures.ts';
import { EmptyState } from '#web/components/blank-state.tsx';
import { Caution } from '#web/components/caution.tsx';
import { PageHead } from '#web/components/page-head.tsx';
import { Read } from '#web/components/read.tsx';
import { Section } from '#web/components/section.tsx';
import { Wrap } from '#web/components/wrap.tsx';
import { boardQuery } from '#web/features/boards/api/boards.ts';
import { viewOf } from '#web/features/boards/board-view.ts';
import { BoardBody } from '#web/features/boards/components/board-body.tsx';
import { BoardFilters } from '#web/features/boards/components/board-filters.tsx';
import { BoardHead } from '#web/features/boards/components/board-head.tsx';
import { BoardMethod } from '#web/features/boards/components/board-method.tsx';
import { NotListed } from '#web/features/boards/components/not-listed.tsx';
import { OwnTray } from '#web/features/boards/components/own-tray.tsx';

const classOf = (params: Readonly<Record<string, string | undefined>>): string => `${params.gateClass ?? ''}/${params.version ?? ''}`;

export const loader = (queryClient: QueryClient) => ({ params, request }: LoaderFunctionArgs) => {
  void queryClient.prefetchQuery(boardQuery(classOf(params), viewOf(new URL(request.url).searchParams)));
  return null;
};

export function Component() {
  const gateClass = classOf(useParams());
  const [search] = useSearchParams();
  const { figure } = viewOf(search);
  // The board read last stays while another figure or filter is fetched.
  const query = useQuery({ ...boardQuery(gateClass, viewOf(search)), placeholderData: (before, last) => (last?.queryKey[1] === gateClass ? keepPreviousData(before) : undefined) });
  return (
    <div className="p-board">
      <Wrap>
        {query.data ? <BoardHead board={query.data} /> : <PageHead above={<Link to="/boards">Boards</Link>} title={query.isError ? 'Board' : gateClass} />}
        <BoardFilters filters={query.data?.filters} />
        {query.data ? <BoardMethod board={query.data} /> : null}
        <section className="boardsec" aria-label="The board" aria-busy={query.isFetching || undefined}>
          <Read level={2} query={query} what="The board" loading="Loading the board" rows={8}
            missing={<EmptyState level={2} title="There is no such gate class" act={<Link className="btn" to="/boards">All boards</Link>}>{`No board has the gate class ${gateClass}.`}</EmptyState>}>
            {(board) => <BoardBody board={board} />}
          </Read>
        </section>
        {query.data ? <NotListed items={query.data.notListed} /> : null}
        <Section title="How to read this">
          <div className="cols2">
            <div className="prose">
              <p>A figure is printed with its interval, never alone. The dot is the estimate from the counts; the interval says how far it could move if the same run were repeated. <Link to={`/method#${boardReadings[figure].key}`}>What this figure is</Link>.</p>
              <p>A rank range holds every place the entry may take, for all entries at once, at 95 % confidence. A place is printed as a single number only where the range is one place. Entries joined by a bracket cannot be told apart, and their order carries no meaning. <Link to="/method#ranks">How ranks are found</Link>.</p>
              <p>Only entries taken on equal terms are compared. What stands under “Not ranked” takes no part.</p>
            </div>
            <Caution />
          </div>
        </Section>
      </Wrap>
      <OwnTray board={query.data} />
    </div>
  );
}
