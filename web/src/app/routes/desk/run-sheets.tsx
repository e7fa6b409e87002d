import { useQuery } from '@tanstack/react-query';
import { ButtonLink } from '#web/components/button.tsx';
import { PageHead } from '#web/components/page-head.tsx';
import { Read } from '#web/components/read.tsx';
import { Wrap } from '#web/components/wrap.tsx';
import { runSheetsQuery } from '#web/features/run-sheets/api/run-sheets.ts';
import { SheetList } from '#web/features/run-sheets/components/sheet-list.tsx';
import { useDesk } from './contributor.tsx';

function RunSheets() {
  const { organisation } = useDesk();
  const sheets = useQuery(runSheetsQuery(organisation.id));
  return (
    <Wrap className="listpage">
      <PageHead slim title="Run sheets" tab={`Run sheets of ${organisation.name}`}>
        {sheets.data?.items.length === 0 ? null : <p className="acts headacts"><ButtonLink kind="first" to="/desk/run-sheets/new">Plan a run sheet</ButtonLink></p>}
      </PageHead>
      <Read level={2} query={sheets} what="The list of run sheets" loading="Loading the run sheets" rows={5}>{({ items }) => <SheetList sheets={items} level={2} />}</Read>
    </Wrap>
  );
}

export { RunSheets as Component };
