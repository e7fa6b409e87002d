import { useRouteError } from 'react-router-dom';
import { FaultState } from '#web/components/fault-state.tsx';
import { PageHead } from '#web/components/page-head.tsx';
import { Wrap } from '#web/components/wrap.tsx';
import { asApiError } from '#web/lib/api-error.ts';

/** Shown in place of a page whose code failed or could not be fetched. */
export function RouteFault() {
  const error = asApiError(useRouteError());
  return (
    <Wrap>
      <PageHead title="This page failed" />
      <FaultState level={2} error={error} what="This page" onRetry={() => window.location.reload()} />
    </Wrap>
  );
}
