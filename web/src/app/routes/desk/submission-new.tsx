import { NewSubmissionPage } from '#web/features/submissions/components/new-submission-page.tsx';
import { useDesk } from './contributor.tsx';

function NewSubmission() {
  const { organisation } = useDesk();
  return <NewSubmissionPage organisation={organisation} />;
}

export { NewSubmission as Component };
