import type { ApiError } from '#web/lib/api-error.ts';
import { BlankState } from './blank-state.tsx';
import { Button } from './button.tsx';

/** A read that failed: "The board could not be read", why, and a way to try again. */
export function FaultState({ error, what, onRetry }: { error: ApiError; what: string; onRetry?: () => void }) {
  return (
    <BlankState title={`${what} could not be read`} live
      act={<>
        {onRetry ? <Button onClick={onRetry}>Try again</Button> : null}
        {error.reference ? <span className="small quiet">Reference {error.reference}</span> : null}
      </>}>
      <p>{error.message}</p>
      {error.help?.startsWith('/problems/') || error.help?.includes('/problems/') ? <p><a href={error.help}>What this means</a></p> : null}
    </BlankState>
  );
}
