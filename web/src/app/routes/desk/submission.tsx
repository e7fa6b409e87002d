import { useParams, type LoaderFunction } from 'react-router-dom';
import type { QueryClient } from '@tanstack/react-query';
import { submissionQuery } from '#web/features/submissions/api/submissions.ts';
import { SubmissionPage } from '#web/features/submissions/components/submission-page.tsx';

export const loader = (client: QueryClient): LoaderFunction => ({ params }) => {
  void client.prefetchQuery(submissionQuery(params['id'] ?? ''));
  return null;
};

export function Component() {
  const { id = '' } = useParams();
  return <SubmissionPage key={id} id={id} />;
}
