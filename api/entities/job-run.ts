import { defineEntity, p, type InferEntity } from '@mikro-orm/core';
import { instant } from './columns.ts';

/** One attempt at a job: who works on it and how far it is. Progress is read from here. */
export const JobRun = defineEntity({
  name: 'JobRun',
  tableName: 'job_run',
  properties: {
    /** The queue's id of the job. */
    id: p.uuid().primary(),
    queue: p.string(),
    /** What the job is about, as given when it was sent: "submission:S-000012". */
    subject: p.string().nullable(),
    attempt: p.integer(),
    /** Key of the advisory lock its worker holds while alive. */
    workerKey: p.integer(),
    stage: p.string().nullable(),
    fraction: p.float(),
    startedAt: instant(),
    updatedAt: instant(),
    finishedAt: instant().nullable(),
    outcome: p.enum(['done', 'failed', 'lost']).nullable(),
    error: p.text().nullable(),
  },
});
export type JobRun = InferEntity<typeof JobRun>;
