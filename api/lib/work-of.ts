import type { Scope } from './define-route.ts';
import type { Deps } from './deps.ts';
import type { Work } from './work.ts';

/** The unit of work of a request. */
export const workOf = ({ em, deps, caller, requestId }: Pick<Scope, 'em' | 'deps' | 'caller' | 'requestId'>): Work => ({
  em,
  clock: deps.clock,
  queue: deps.queue,
  runInThread: deps.threads.run,
  logKey: deps.logKey,
  doiPrefix: deps.config.doi?.prefix ?? null,
  caller,
  requestId,
});

/** The registry's own work: in a job, or while it looks after itself. */
export const registryWork = (em: Work['em'], deps: Pick<Deps, 'clock' | 'queue' | 'logKey' | 'threads' | 'config'>, runInThread: Work['runInThread'] = deps.threads.run): Work => ({
  em,
  clock: deps.clock,
  queue: deps.queue,
  runInThread,
  logKey: deps.logKey,
  doiPrefix: deps.config.doi?.prefix ?? null,
  caller: null,
});
