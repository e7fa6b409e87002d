import type { ApiError } from '#web/lib/api-error.ts';
import { BlankState, type HeadingLevel } from './blank-state.tsx';
import { Button } from './button.tsx';

/** A read that failed: "The board could not be read", why, and a way to try again. */
export function FaultState({ error, what, onRetry, level = 3 }: { error: ApiError; what: string; onRetry?: () => void; level?: HeadingLevel }) {
  return (
    <BlankState title={`${what} could not be read`} live level={level}
      act={<>
        {onRetry ? <Button onClick={onRetry}>Try again</Button> : null}
        {error.reference ? <span className="small quiet">Reference {error.reference}</span> : null}
      </>}>
      <p>{error.message}</p>
      {error.help?.startsWith('/problems/') || error.help?.includes('/problems/') ? <p><a href={error.help}>What this means</a></p> : null}
    </BlankState>
  );
}
