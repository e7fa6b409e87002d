import type { EntityManager } from '@mikro-orm/postgresql';
import { runSql } from '#api/lib/run-sql.ts';

/** How often a task may be given up for an estimate before it runs to its end: a busy registry still gets its opinions. */
const mostTimes = 5;
const lookEveryMs = 1000;

/** Does an estimate wait for a thread or hold one? Jobs that rest until a later day do not count. */
const estimateWaits = async (em: EntityManager): Promise<boolean> => {
  const [row] = await runSql<{ waits: boolean }>(em, `select exists (select 1 from pgboss.job where name = 'estimate' and state in ('created', 'retry', 'active') and start_after <= now()) as waits`);
  return row?.waits ?? false;
};

const pause = (signal: AbortSignal | undefined): Promise<void> =>
  new Promise((resolve, reject) => {
    signal?.throwIfAborted();
    const timer = setTimeout(resolve, lookEveryMs);
    signal?.addEventListener('abort', () => (clearTimeout(timer), reject(signal.reason as Error)), { once: true });
  });

/**
 * Runs a long task behind all estimates: it begins when none waits, and is given up and begun anew when one comes, because a
 * worker on two cores has one thread for both. A task is pure, so nothing is lost but time.
 */
export const givingWay = async <T>(em: EntityManager, signal: AbortSignal | undefined, run: (signal: AbortSignal) => Promise<T>): Promise<T> => {
  for (let given = 0; ; given += 1) {
    while (given < mostTimes && (await estimateWaits(em.fork()))) await pause(signal);
    const way = new AbortController();
    const timer = given < mostTimes ? setInterval(() => void estimateWaits(em.fork()).then((waits) => (waits ? way.abort() : undefined), () => undefined), lookEveryMs) : null;
    try {
      return await run(signal ? AbortSignal.any([signal, way.signal]) : way.signal);
    } catch (fault) {
      if (!way.signal.aborted || signal?.aborted) throw fault;
    } finally {
      if (timer) clearInterval(timer);
    }
  }
};
