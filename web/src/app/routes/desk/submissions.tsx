import { useQuery } from '@tanstack/react-query';
import { ButtonLink } from '#web/components/button.tsx';
import { PageHead } from '#web/components/page-head.tsx';
import { Read } from '#web/components/read.tsx';
import { Wrap } from '#web/components/wrap.tsx';
import { submissionsQuery } from '#web/features/submissions/api/submissions.ts';
import { SubmissionList } from '#web/features/submissions/components/submission-list.tsx';
import { useDesk } from './contributor.tsx';

function Submissions() {
  const { organisation } = useDesk();
  const submissions = useQuery(submissionsQuery(organisation.id));
  return (
    <Wrap className="listpage">
      <PageHead slim title="Submissions" tab={`Submissions of ${organisation.name}`}>
        {submissions.data?.items.length === 0 ? null : <p className="acts headacts"><ButtonLink kind="first" to="/desk/submissions/new">Submit a dataset</ButtonLink></p>}
      </PageHead>
      <Read level={2} query={submissions} what="The list of submissions" loading="Loading the submissions" rows={5}>{({ items }) => <SubmissionList submissions={items} level={2} />}</Read>
    </Wrap>
  );
}

export { Submissions as Component };
