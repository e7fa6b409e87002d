import type { MikroORM } from '@mikro-orm/postgresql';
import type pg from 'pg';
import type { Logger } from 'pino';
import type { Config } from '#api/config/config.ts';
import type { Queue } from '#api/jobs/queue.ts';
import type { ThreadPool } from '#api/jobs/threads.ts';
import type { Clock } from './clock.ts';
import type { LogKey } from './log-key.ts';

/** What every part of the server is given; nothing reaches for a global. */
export interface Deps {
  config: Config;
  orm: MikroORM;
  /** Plain connections for the session table and LISTEN. */
  pool: pg.Pool;
  queue: Queue;
  /** Worker threads for what would hold up the process: reading, checking, estimating. */
  threads: ThreadPool;
  clock: Clock;
  logKey: LogKey;
  log: Logger;
}
