import { useParams, type LoaderFunction } from 'react-router-dom';
import type { QueryClient } from '@tanstack/react-query';
import { runSheetQuery } from '#web/features/run-sheets/api/run-sheets.ts';
import { SheetPage } from '#web/features/run-sheets/components/sheet-page.tsx';

export const loader = (client: QueryClient): LoaderFunction => ({ params }) => {
  void client.prefetchQuery(runSheetQuery(params['id'] ?? ''));
  return null;
};

export function Component() {
  const { id = '' } = useParams();
  return <SheetPage key={id} id={id} />;
}
