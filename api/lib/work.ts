import type { EntityManager } from '@mikro-orm/postgresql';
import type { Queue } from '#api/jobs/queue.ts';
import type { RunInThread } from '#api/jobs/threads.ts';
import type { Caller } from './caller.ts';
import type { Clock } from './clock.ts';
import type { LogKey } from './log-key.ts';

/**
 * What a service is given: a unit of work, the time, and who asks. Routes, jobs and the demo registry make one each.
 * `caller` null: the registry itself.
 */
export interface Work {
  em: EntityManager;
  clock: Clock;
  queue: Queue;
  runInThread: RunInThread;
  /** Signs what is written to the log. */
  logKey: LogKey;
  /** Under which DOIs are registered; null or absent: none are. */
  doiPrefix?: string | null;
  caller: Caller | null;
  requestId?: string | null;
}

/** Runs in one transaction: all of it or nothing. Inside another it joins that one. */
export const inTransaction = async <T>(work: Work, run: (work: Work) => Promise<T>): Promise<T> =>
  work.em.isInTransaction() ? run(work) : work.em.fork().transactional((em) => run({ ...work, em }));
