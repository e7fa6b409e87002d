import { createHash } from 'node:crypto';
import { isDeepStrictEqual } from 'node:util';
import type { EntityManager, ForkOptions } from '@mikro-orm/postgresql';
import { SettableClock } from '#api/lib/clock.ts';
import type { OwnedDeps } from '#api/lib/make-deps.ts';
import { runSql } from '#api/lib/run-sql.ts';
import type { Queue } from '#api/jobs/queue.ts';
import type { DrawSheetInput } from '#api/jobs/tasks/draw-sheet.ts';
import type { EstimateDatasetInput } from '#api/jobs/tasks/estimate-dataset.ts';
import type { TaskInput, TaskName, TaskOutput } from '#api/jobs/thread-tasks.ts';
import type { RunInThread } from '#api/jobs/threads.ts';
import type { Moment } from './acts/context.ts';
import type { Act } from './acts/script.ts';
import type { SheetOrder, SheetOutcome } from './foresight/work.ts';

/** Forks stay inside the transaction, so that services which look with a fresh eye see what the transaction wrote. */
const staying = (em: EntityManager): EntityManager => {
  const fork = em.fork.bind(em);
  em.fork = ((options?: ForkOptions) => staying(fork({ ...options, keepTransactionContext: true }) as EntityManager)) as typeof em.fork;
  return em;
};

const digest = (bytes: Uint8Array): string => createHash('sha256').update(bytes).digest('hex');

/** Answers the registry's tasks for threads: with what was drawn and estimated ahead, and in a thread with what is quick. */
const foreseen = (deps: OwnedDeps, orders: readonly SheetOrder[], outcomes: ReadonlyMap<string, SheetOutcome>): RunInThread => {
  const sheets = new Map(orders.map((order) => [order.sheet.id, order]));
  const estimates = new Map([...outcomes.values()].flatMap(({ runs }) => runs.map((run) => [digest(run.bytes), run.estimate] as const)));
  const drawn = (asked: DrawSheetInput): SheetOutcome['drawn'] => {
    const order = sheets.get(asked.id);
    if (!order || !isDeepStrictEqual(order.sheet, asked)) throw new Error(`The sheet ${asked.id} was foreseen otherwise than it is asked for.`);
    return outcomes.get(order.key)?.drawn ?? null;
  };
  const known = (name: TaskName, input: unknown): unknown => {
    if (name === 'draw-sheet') return drawn(input as DrawSheetInput);
    if (name === 'estimate-dataset') return estimates.get(digest((input as EstimateDatasetInput).bytes)) ?? null;
    return undefined;
  };
  return async <N extends TaskName>(name: N, input: TaskInput<N>): Promise<TaskOutput<N>> => {
    const answer = known(name, input);
    if (answer === null) throw new Error(`The demo did not foresee this ${name}.`);
    return answer === undefined ? deps.threads.run(name, input) : (answer as TaskOutput<N>);
  };
};

/** Little is left to the worker, which would find most jobs done: what rests at "checking" waits there for a day, and second opinions are made later. */
const demoQueue = (deps: OwnedDeps, rests: () => boolean): Queue => ({
  send: async (name, data, options) => {
    if (name === 'opinions') return deps.queue.send(name, data, options);
    return name === 'estimate' && rests() ? deps.queue.send(name, data, { ...options, startAfter: new Date(Date.now() + 86_400_000) }) : null;
  },
  isUp: () => deps.queue.isUp(),
  stop: async () => undefined,
});

/** Lives through the script in one transaction: after a fault, or the end of the process, nothing of it is there. */
export const liveThrough = async (deps: OwnedDeps, acts: readonly Act[], orders: readonly SheetOrder[], outcomes: ReadonlyMap<string, SheetOutcome>, onAct: (act: Act, share: number) => void): Promise<void> => {
  const runInThread = foreseen(deps, orders, outcomes);
  let current: Act | undefined;
  const queue = demoQueue(deps, () => current?.rests ?? false);
  const records: Moment['records'] = new Map();
  await deps.orm.em.fork().transactional(async (tx) => {
    const em = staying(tx as EntityManager);
    for (const [i, act] of acts.entries()) {
      current = act;
      const own = em.fork();
      try {
        await act.run({ em: own, clock: new SettableClock(act.at), queue, runInThread, logKey: deps.logKey, records, outcomes });
        await own.flush();
      } catch (fault) {
        throw new Error(`The demo stopped at "${act.name}", ${act.at.toISOString()}: ${fault instanceof Error ? fault.message : String(fault)}`, { cause: fault });
      }
      onAct(act, (i + 1) / acts.length);
    }
    // The letters of two years count as sent on their day: nobody invented gets them all at once.
    await runSql(em, 'update mail_outbox set sent_at = queued_at where sent_at is null');
  });
};
