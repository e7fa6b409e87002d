import type { EntityManager } from '@mikro-orm/postgresql';
import { Submission } from '#api/entities/submission.ts';
import type { EstimateReport } from '#api/jobs/tasks/estimate-dataset.ts';

const writeEveryMs = 250;

/** Writes the newest report to the submission's row at most every quarter of a second, one write at a time, and only while it is being checked. */
export const submissionProgress = (em: EntityManager, id: string, round: number, onFault: (fault: unknown) => void) => {
  let newest: EstimateReport | null = null;
  let timer: NodeJS.Timeout | null = null;
  let writing: Promise<unknown> = Promise.resolve();
  const write = (): void => {
    timer = null;
    const report = newest;
    newest = null;
    if (!report) return;
    const state = { progress: Math.min(1, report.fraction), stage: report.stage, ...(report.replicatesDone === undefined ? {} : { replicatesDone: report.replicatesDone }) };
    writing = writing.then(() => em.nativeUpdate(Submission, { id, round, state: 'checking' }, state)).catch(onFault);
  };
  return {
    report: (report: EstimateReport): void => {
      newest = { ...newest, ...report };
      timer ??= setTimeout(write, writeEveryMs);
    },
    settle: async (): Promise<void> => {
      if (timer) clearTimeout(timer);
      write();
      await writing;
    },
  };
};
