import pg from 'pg';
import { pino } from 'pino';
import { MikroORM } from '@mikro-orm/postgresql';
import { testLogKey } from './log-key.ts';
import { testConfig } from './test-app.ts';
import { defineJob } from '#api/jobs/define-job.ts';
import { startQueue } from '#api/jobs/queue.ts';
import { startThreads } from '#api/jobs/threads.ts';
import { startWorker } from '#api/jobs/start-worker.ts';
import { systemClock } from '#api/lib/clock.ts';
import { readLogKey } from '#api/lib/log-key.ts';
import { ormOptions } from '#api/mikro-orm.config.ts';

/** A worker process of its own, to be killed by a test: takes one estimate job and never finishes it. */
const url = process.argv[2] ?? '';
const orm = await MikroORM.init(ormOptions(url, 2));
const deps = { config: testConfig(url), orm, pool: new pg.Pool({ connectionString: url, max: 1 }), queue: await startQueue(url, () => undefined), threads: startThreads({ threads: 1 }), clock: systemClock, logKey: readLogKey(testLogKey), log: pino({ level: 'silent' }) };
const job = defineJob({
  name: 'estimate',
  subject: ({ submission }) => `submission:${submission}`,
  handle: async ({ progress }) => {
    progress('working', 0.5);
    await new Promise((resolve) => setTimeout(resolve, 600_000));
  },
});
await startWorker(deps, [job]);
