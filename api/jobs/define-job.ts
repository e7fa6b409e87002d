import type { EntityManager } from '@mikro-orm/postgresql';
import type { z } from 'zod';
import type { Deps } from '#api/lib/deps.ts';
import type { RunInThread } from './threads.ts';

export interface JobContext<T> {
  jobId: string;
  /** 1 for the first attempt. */
  attempt: number;
  data: T;
  /** A fork of its own for this attempt. */
  em: EntityManager;
  deps: Deps;
  /** Fires when the worker is told to stop; the job is then taken up again by another. */
  signal: AbortSignal;
  /** Stage in words and share done, 0 to 1. Written to job_run at most a few times a second. */
  progress: (stage: string, fraction: number) => void;
  /** Runs a task of jobs/thread-tasks.ts in a worker thread. */
  runInThread: RunInThread;
}

export interface JobOptions {
  /** Attempts after the first; 3 unless told. */
  retryLimit?: number;
  /** Seconds before the second attempt, doubled each time; 5 unless told. */
  retryDelay?: number;
  /** Longest an attempt may take before it counts as lost; 30 minutes unless told. */
  expireInSeconds?: number;
  /** How many of these one worker process works on at once; 1 unless told. */
  concurrency?: number;
  /** Cron line (UTC) for jobs that the worker schedules by itself. */
  schedule?: string;
}

export interface JobDefinition<S extends z.ZodType = z.ZodType> {
  name: string;
  payload: S;
  options: JobOptions;
  handle: (context: JobContext<z.infer<S>>) => Promise<void>;
}

/** A kind of job: queue name, payload schema, handler. A handler must bear being run twice. */
export const defineJob = <S extends z.ZodType>(definition: { name: string; payload: S; options?: JobOptions; handle: (context: JobContext<z.infer<S>>) => Promise<void> }): JobDefinition<S> => ({
  options: {},
  ...definition,
});
