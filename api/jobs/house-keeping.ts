import { IdempotencyKey } from '#api/entities/idempotency-key.ts';
import { JobRun } from '#api/entities/job-run.ts';
import { forgetFactors } from '#api/modules/run-sheets/factor-store.ts';
import { defineJob } from './define-job.ts';

const hour = 3_600_000;
/** A repeated request is answered alike for two days; longer than any client's patience. */
const idempotencyLifeMs = 48 * hour;
const runLifeMs = 30 * 24 * hour;

/** Removes what has had its time: sessions that ended, answers kept for repeats, notes of old attempts, factors of designs long unused. */
export const houseKeepingJob = defineJob({
  name: 'house-keeping',
  schedule: '17 * * * *',
  handle: async ({ em, deps }) => {
    const now = deps.clock.now().getTime();
    // The session library compares with the database's own clock, so this does too.
    await em.execute('delete from session where expire < now()');
    await em.nativeDelete(IdempotencyKey, { createdAt: { $lt: new Date(now - idempotencyLifeMs) } });
    await forgetFactors(em);
    await em.nativeDelete(JobRun, { finishedAt: { $lt: new Date(now - runLifeMs) } });
  },
});
