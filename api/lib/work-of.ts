import type { Scope } from './define-route.ts';
import type { Work } from './work.ts';

/** The unit of work of a request. */
export const workOf = ({ em, deps, caller, requestId }: Pick<Scope, 'em' | 'deps' | 'caller' | 'requestId'>): Work => ({
  em,
  clock: deps.clock,
  queue: deps.queue,
  runInThread: deps.threads.run,
  caller,
  requestId,
});
