import { useQuery, type QueryClient } from '@tanstack/react-query';
import { BlankState } from '#web/components/blank-state.tsx';
import { demoWords } from '#web/components/demo.tsx';
import { FindBox } from '#web/components/find-box.tsx';
import { PageTitle } from '#web/components/page-title.tsx';
import { Read } from '#web/components/read.tsx';
import { Section } from '#web/components/section.tsx';
import { Wrap } from '#web/components/wrap.tsx';
import { boardListQuery } from '#web/features/boards/api/boards.ts';
import { BoardListTable } from '#web/features/boards/components/board-list-table.tsx';
import { entriesQuery, entryQuery } from '#web/features/entries/api/entries.ts';
import { EntryLines } from '#web/features/entries/components/entry-lines.tsx';
import { Doors } from '#web/features/home/components/doors.tsx';
import { Lesson } from '#web/features/home/components/lesson.tsx';
import { StepsToRecord } from '#web/features/home/components/steps-to-record.tsx';

const newestQuery = () => entriesQuery({ limit: 6 });

export const loader = (queryClient: QueryClient) => () => {
  void queryClient.prefetchQuery(boardListQuery());
  void queryClient.prefetchQuery(newestQuery());
  return null;
};

/** The figure in the lesson is the headline of the newest entry that stands. */
function LessonFigure() {
  const newest = useQuery(newestQuery()).data?.items.find((item) => item.state === 'frozen');
  const shown = useQuery({ ...entryQuery(newest?.accession ?? '', newest?.version ?? null), enabled: newest !== undefined }).data;
  return (
    <figure className="lesson">
      {shown ? <Lesson entry={shown} /> : <div className="lessonroom" />}
      <figcaption className="says">Every figure on Evenbeam is drawn like this. The wide steps are where the true value is most likely; the thin ends are still possible.{shown?.demo ? <span className="quiet"> {demoWords}</span> : null}</figcaption>
    </figure>
  );
}

export function Component() {
  const boards = useQuery(boardListQuery());
  const newest = useQuery(newestQuery());
  return (
    <>
      <PageTitle>An open registry of gate quality</PageTitle>
      <Wrap className="hero">
        <div>
          <h1>Gate quality, measured one way and printed with its doubt</h1>
          <p className="opening">Providers quote error figures from different protocols on chosen days. Evenbeam re-estimates every dataset with one fixed method, attaches the uncertainty, and freezes the result so that it can be cited and recomputed.</p>
          <FindBox />
        </div>
        <LessonFigure />
      </Wrap>
      <Wrap>
        <Section title="Boards" aside="One for each gate class. Only entries taken on equal terms stand on it.">
          <Read query={boards} what="The list of boards" loading="Loading the boards" rows={4}>{(list) => <BoardListTable boards={list.items} />}</Read>
        </Section>
        <Section title="Newest entries">
          <Read query={newest} what="The newest entries" loading="Loading the newest entries" rows={4}>
            {(list) => (list.items.length > 0 ? <EntryLines items={list.items} /> : <BlankState title="No entry yet">The first dataset that a curator accepts will stand here.</BlankState>)}
          </Read>
        </Section>
        <StepsToRecord />
        <Doors />
      </Wrap>
    </>
  );
}
