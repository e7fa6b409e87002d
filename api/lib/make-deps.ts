import { MikroORM } from '@mikro-orm/postgresql';
import pg from 'pg';
import { pino, type Logger } from 'pino';
import type { Config } from '#api/config/config.ts';
import { startQueue } from '#api/jobs/queue.ts';
import { startThreads } from '#api/jobs/threads.ts';
import { ormOptions } from '#api/mikro-orm.config.ts';
import { systemClock, type Clock } from './clock.ts';
import type { Deps } from './deps.ts';
import { readLogKey } from './log-key.ts';

export interface OwnedDeps extends Deps {
  /** Closes what was opened here, in the reverse order. */
  close(): Promise<void>;
}

/** Opens the connections and pools that one process needs. */
export const makeDeps = async (config: Config, more: { clock?: Clock; log?: Logger } = {}): Promise<OwnedDeps> => {
  const log = more.log ?? pino({ level: config.logLevel });
  const orm = await MikroORM.init(ormOptions(config.databaseUrl, config.databasePool));
  const pool = new pg.Pool({ connectionString: config.databaseUrl, max: 4, application_name: 'evenbeam-sessions' });
  pool.on('error', (fault) => log.error({ err: fault }, 'a pooled connection broke'));
  const queue = await startQueue(config.databaseUrl, (fault) => log.error({ err: fault }, 'job queue'));
  const threads = startThreads({ threads: config.workerThreads, file: config.threadFile });
  return {
    config, orm, pool, queue, threads, log,
    logKey: readLogKey(config.logSigningKey),
    clock: more.clock ?? systemClock,
    close: async () => {
      await threads.stop();
      await queue.stop();
      await pool.end();
      await orm.close(true);
    },
  };
};
