import pg from 'pg';
import { pino } from 'pino';
import { MikroORM } from '@mikro-orm/postgresql';
import { reEstimateJob } from '#api/jobs/re-estimate.ts';
import { startQueue } from '#api/jobs/queue.ts';
import { startWorker } from '#api/jobs/start-worker.ts';
import { startThreads } from '#api/jobs/threads.ts';
import { systemClock } from '#api/lib/clock.ts';
import { readLogKey } from '#api/lib/log-key.ts';
import { ormOptions } from '#api/mikro-orm.config.ts';
import { testLogKey } from './log-key.ts';
import { testConfig } from './test-app.ts';

/** A worker process of its own, to be killed by a test: takes an item of a campaign up and never finishes its estimate. */
const url = process.argv[2] ?? '';
const orm = await MikroORM.init(ormOptions(url, 3));
const threads = { ...startThreads({ threads: 1 }), run: () => new Promise<never>((resolve) => void setTimeout(resolve, 600_000)) };
const deps = { config: testConfig(url), orm, pool: new pg.Pool({ connectionString: url, max: 1 }), queue: await startQueue(url, () => undefined), threads, clock: systemClock, logKey: readLogKey(testLogKey), log: pino({ level: 'silent' }) };
await startWorker(deps, [reEstimateJob]);
