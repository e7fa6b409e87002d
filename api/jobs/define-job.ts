import type { EntityManager } from '@mikro-orm/postgresql';
import type { Deps } from '#api/lib/deps.ts';
import type { Payload, QueueName } from './queue-names.ts';
import type { RunInThread } from './threads.ts';

export interface JobContext<T> {
  jobId: string;
  /** 1 for the first attempt. */
  attempt: number;
  data: T;
  /** A fork of its own for this attempt. */
  em: EntityManager;
  deps: Deps;
  /** Fires when the worker is told to stop; the job is then taken up again, here or elsewhere. */
  signal: AbortSignal;
  /** Stage in words and share done, 0 to 1. Written to job_run a few times a second at most. */
  progress: (stage: string, fraction: number) => void;
  /** Runs a task of jobs/thread-tasks.ts in a worker thread; stops with the job. */
  runInThread: RunInThread;
}

export interface JobDefinition<N extends QueueName = QueueName> {
  name: N;
  /** What the job is about, kept with each attempt: "submission:S-000012". Progress is found by it. */
  subject?: (data: Payload<N>) => string;
  /** How many of these one worker process works on at once; 1 unless told. */
  concurrency?: number;
  /** Cron line (UTC) for a job that is due by itself; sent with an empty payload. */
  schedule?: string;
  /** Does the work. May run again after a crash at any point, so a second run must do no harm. */
  handle: (context: JobContext<Payload<N>>) => Promise<void>;
  /** Called once when the last attempt has failed or was lost, so that nothing stays waiting for ever. */
  exhausted?: (context: Omit<JobContext<Payload<N>>, 'progress' | 'runInThread' | 'signal'>, reason: string) => Promise<void>;
}

/** A definition with its payload type taken off, as the list of all jobs holds it. */
export type Job = JobDefinition<never>;

/** A kind of job: its queue (name and payload in queue-names.ts) and its handler. Listed in jobs/all-jobs.ts. */
export const defineJob = <N extends QueueName>(definition: JobDefinition<N>): Job => definition as unknown as Job;
