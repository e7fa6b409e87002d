import { RunSheet } from '#api/entities/run-sheet.ts';
import { drawRunSheet, giveUpRunSheet } from '#api/modules/run-sheets/draw.ts';
import { registryWork } from '#api/lib/work-of.ts';
import { defineJob } from './define-job.ts';
import { latestWrite } from './latest-write.ts';

/** Draws a run sheet. */
export const drawSheetJob = defineJob({
  name: 'draw-sheet',
  subject: ({ runSheet }) => `run-sheet:${runSheet}`,
  handle: async ({ data, em, deps, signal, progress, runInThread }) => {
    const id = data.runSheet;
    const fork = em.fork();
    const row = latestWrite<{ stage: string; fraction: number }>(
      ({ stage, fraction }) => fork.nativeUpdate(RunSheet, { id, state: 'drawing' }, { progress: Math.min(1, Math.max(0, fraction)), message: stage }),
      (fault) => deps.log.warn({ err: fault, runSheet: id }, 'progress was not written'),
    );
    try {
      await drawRunSheet(registryWork(em, deps, runInThread), id, {
        signal,
        onProgress: (report) => {
          progress(report.stage, report.fraction);
          row.report(report);
        },
      });
    } finally {
      await row.settle();
    }
  },
  exhausted: async ({ data, em, deps }) => giveUpRunSheet(registryWork(em, deps), data.runSheet, 'The registry could not draw the sheet. The fault is ours and is noted; ask for it again.'),
});
