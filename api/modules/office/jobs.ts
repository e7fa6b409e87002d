import type { EntityManager } from '@mikro-orm/postgresql';
import type { JobsOverview } from '#shared/contracts/office.ts';
import { AppError } from '#shared/errors/app-error.ts';
import { JobRun } from '#api/entities/job-run.ts';
import { queueNames, type QueueName } from '#api/jobs/queue-names.ts';
import { recordAudit } from '#api/lib/audit.ts';
import { runSql } from '#api/lib/run-sql.ts';
import { inTransaction, type Work } from '#api/lib/work.ts';

/** Queues whose failures are noted where they belong: another attempt at the job itself would find nothing to do. */
const answeredElsewhere: ReadonlySet<string> = new Set<QueueName>(['estimate', 'draw-sheet', 're-estimate']);

const mostFailed = 100;

interface QueueRow {
  name: string;
  waiting: string;
  later: string;
  running: string;
  failed: string;
}

interface FailedRow {
  id: string;
  queue: string;
  subject: string | null;
  attempts: number;
  reason: string | null;
  at: string;
}

/** What the queue holds now, and the jobs that failed for good in the last hours. */
export const readJobs = async (em: EntityManager): Promise<JobsOverview> => {
  const counts = await runSql<QueueRow>(em, `
    select name, count(*) filter (where state in ('created', 'retry') and start_after <= now()) as waiting, count(*) filter (where state in ('created', 'retry') and start_after > now()) as later,
           count(*) filter (where state = 'active') as running, count(*) filter (where state = 'failed') as failed
      from pgboss.job where name = any($1) group by name`, [queueNames]);
  const byName = new Map(counts.map((row) => [row.name, row]));
  const failed = await runSql<FailedRow>(em, `
    select j.id, j.name as queue, r.subject, j.retry_count + 1 as attempts, coalesce(r.error, j.output ->> 'message') as reason, j.completed_on as at
      from pgboss.job j left join job_run r on r.id = j.id
     where j.state = 'failed' and j.name = any($1) order by j.completed_on desc limit ${mostFailed}`, [queueNames]);
  const running = await em.find(JobRun, { finishedAt: null }, { orderBy: { startedAt: 'asc' }, limit: mostFailed });
  return {
    queues: queueNames.map((name) => {
      const row = byName.get(name);
      return { name, waiting: Number(row?.waiting ?? 0), later: Number(row?.later ?? 0), running: Number(row?.running ?? 0), failed: Number(row?.failed ?? 0) };
    }),
    running: running.map((r) => ({ id: r.id, queue: r.queue, subject: r.subject ?? null, attempt: r.attempt, stage: r.stage ?? null, fraction: r.fraction, startedAt: r.startedAt.toISOString() })),
    failed: failed.map((row) => ({ ...row, attempts: Number(row.attempts), reason: row.reason ?? 'No reason was noted.', at: new Date(row.at).toISOString(), retriable: !answeredElsewhere.has(row.queue) })),
  };
};

/** One more attempt at a job that failed for good. */
export const retryJob = (work: Work, queue: string, id: string): Promise<void> =>
  inTransaction(work, async ({ em, clock, caller, requestId }) => {
    const [job] = await runSql<{ state: string }>(em, 'select state from pgboss.job where name = $1 and id = $2 for update', [queue, id]);
    if (!job) throw new AppError('not-found', `The queue ${JSON.stringify(queue)} has no job ${id}.`);
    if (job.state !== 'failed') throw new AppError('wrong-state', `This cannot be done now: the job is "${job.state}", not "failed".`);
    if (answeredElsewhere.has(queue)) throw new AppError('wrong-state', 'Its failure was noted with the submission, run sheet or campaign it belongs to, and is answered there.');
    await runSql(em, `update pgboss.job set state = 'retry', retry_limit = retry_limit + 1, start_after = now(), completed_on = null where name = $1 and id = $2`, [queue, id]);
    recordAudit(em, { at: clock.now(), action: 'job.retry', ...(caller ? { caller } : {}), subjectType: 'job', subjectId: id, requestId: requestId ?? null, detail: { queue } });
  });
