import type { EntityManager } from '@mikro-orm/postgresql';
import { JobRun } from '#api/entities/job-run.ts';
import type { Clock } from '#api/lib/clock.ts';

export interface RunStart {
  id: string;
  queue: string;
  subject: string | null;
  attempt: number;
  workerKey: number;
}

const writeEveryMs = 250;

/** Notes the start of an attempt; a row of an earlier attempt is taken over. */
export const beginRun = async (em: EntityManager, clock: Clock, start: RunStart): Promise<void> => {
  const now = clock.now();
  await em.upsert(JobRun, { ...start, stage: null, fraction: 0, startedAt: now, updatedAt: now, finishedAt: null, outcome: null, error: null });
};

export const endRun = async (em: EntityManager, clock: Clock, id: string, outcome: 'done' | 'failed' | 'lost', error: string | null = null): Promise<void> => {
  const now = clock.now();
  await em.nativeUpdate(JobRun, { id, finishedAt: null }, { finishedAt: now, updatedAt: now, outcome, error, ...(outcome === 'done' ? { fraction: 1 } : {}) });
};

/** A progress function that writes the newest state at most every quarter of a second, one write at a time. */
export const progressWriter = (em: EntityManager, clock: Clock, id: string, onFault: (fault: unknown) => void): { report: (stage: string, fraction: number) => void; settle: () => Promise<void> } => {
  let newest: { stage: string; fraction: number } | null = null;
  let timer: NodeJS.Timeout | null = null;
  let writing: Promise<unknown> = Promise.resolve();
  const write = (): void => {
    timer = null;
    const state = newest;
    newest = null;
    if (state) writing = writing.then(() => em.nativeUpdate(JobRun, { id, finishedAt: null }, { ...state, updatedAt: clock.now() })).catch(onFault);
  };
  return {
    report: (stage, fraction) => {
      newest = { stage, fraction: Math.min(1, Math.max(0, fraction)) };
      timer ??= setTimeout(write, writeEveryMs);
    },
    settle: async () => {
      if (timer) clearTimeout(timer);
      write();
      await writing;
    },
  };
};

/** How far the newest attempt about this subject is; null where there was none. */
export const progressOf = async (em: EntityManager, subject: string): Promise<{ stage: string | null; fraction: number; finished: boolean } | null> => {
  const run = await em.findOne(JobRun, { subject }, { orderBy: { startedAt: 'desc' } });
  return run ? { stage: run.stage ?? null, fraction: run.fraction, finished: run.finishedAt !== null && run.finishedAt !== undefined } : null;
};
