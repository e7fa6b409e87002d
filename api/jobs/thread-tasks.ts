import { rankRanges, type RankEntry } from '#shared/stats/rank-ranges.ts';
import { checkDataset, type CheckDatasetInput } from './tasks/check-dataset.ts';
import { drawRunSheetTask, type DrawSheetInput } from './tasks/draw-sheet.ts';
import { estimateDataset, type EstimateDatasetInput } from './tasks/estimate-dataset.ts';
import { inspectDataset } from './tasks/inspect-dataset.ts';
import { secondOpinions, type SecondOpinionsInput } from './tasks/second-opinions.ts';
import type { ThreadProgress } from './threads.ts';

type Report = (progress: ThreadProgress) => void;

/**
 * The tasks a worker thread can do, by name. Inputs and outputs are copied between threads, so they are plain
 * data (typed arrays included). Only threads load this module.
 */
export const threadTasks = {
  /** Counts to `steps`, reporting each one: shows that threads, progress and stopping work. */
  'self-check': async (input: { steps: number; pauseMs: number }, report: Report): Promise<{ steps: number }> => {
    for (let step = 1; step <= input.steps; step += 1) {
      await new Promise((resolve) => setTimeout(resolve, input.pauseMs));
      report({ stage: 'counting', fraction: step / input.steps });
    }
    return { steps: input.steps };
  },
  /** Reads a file that has come in: faults with their places, or content id and summary. */
  'inspect-dataset': async (input: { bytes: Uint8Array }) => inspectDataset(input),
  /** Draws a run sheet with its seal. */
  'draw-sheet': async (input: DrawSheetInput, report: Report) => drawRunSheetTask(input, report),
  /** Checks that come before the estimate. */
  'check-dataset': async (input: CheckDatasetInput) => checkDataset(input),
  /** The official estimate with the review's diagnostics. */
  'estimate-dataset': async (input: EstimateDatasetInput, report: Report) => estimateDataset(input, report),
  /** Second opinions by some of the other routes. */
  'second-opinions': async (input: SecondOpinionsInput, report: Report) => secondOpinions(input, report),
  /** Rank ranges of a board with many entries. */
  'rank-ranges': async (input: { entries: RankEntry[]; better: 'higher' | 'lower'; level: number }) => rankRanges(input.entries, input.better, input.level),
};

type Tasks = typeof threadTasks;
export type TaskName = keyof Tasks;
export type TaskInput<N extends TaskName> = Parameters<Tasks[N]>[0];
export type TaskOutput<N extends TaskName> = Awaited<ReturnType<Tasks[N]>>;
