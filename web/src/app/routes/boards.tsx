import { useQuery, type QueryClient } from '@tanstack/react-query';
import { PageHead } from '#web/components/page-head.tsx';
import { Read } from '#web/components/read.tsx';
import { Section } from '#web/components/section.tsx';
import { Wrap } from '#web/components/wrap.tsx';
import { boardListQuery } from '#web/features/boards/api/boards.ts';
import { BoardListTable } from '#web/features/boards/components/board-list-table.tsx';

export const loader = (queryClient: QueryClient) => () => {
  void queryClient.prefetchQuery(boardListQuery());
  return null;
};

export function Component() {
  const query = useQuery(boardListQuery());
  return (
    <Wrap>
      <PageHead title="Boards" opening="One board for each gate class. Only entries taken on equal terms stand on it: the same circuits drawn by the registry, the same floors, the same method." />
      <Section title="Gate classes" aside="A class fixes the gates, the register and the least number of circuits and shots.">
        <Read query={query} what="The list of boards" loading="Loading the boards" rows={4}>{(list) => <BoardListTable boards={list.items} />}</Read>
      </Section>
    </Wrap>
  );
}
