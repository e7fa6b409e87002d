import type { CheckDatasetInput } from './tasks/check-dataset.ts';
import type { EstimateDatasetInput } from './tasks/estimate-dataset.ts';
import type { ThreadProgress } from './threads.ts';

type Report = (progress: ThreadProgress) => void;

/**
 * The tasks a worker thread can do, by name. Inputs and outputs are copied between threads, so they are plain
 * data (typed arrays included). Each is loaded when first asked for.
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
  'inspect-dataset': async (input: { bytes: Uint8Array }) => (await import('./tasks/inspect-dataset.ts')).inspectDataset(input),
  /** Checks that come before the estimate. */
  'check-dataset': async (input: CheckDatasetInput) => (await import('./tasks/check-dataset.ts')).checkDataset(input),
  /** The official estimate with the review's diagnostics. */
  'estimate-dataset': async (input: EstimateDatasetInput, report: Report) => (await import('./tasks/estimate-dataset.ts')).estimateDataset(input, report),
};

type Tasks = typeof threadTasks;
export type TaskName = keyof Tasks;
export type TaskInput<N extends TaskName> = Parameters<Tasks[N]>[0];
export type TaskOutput<N extends TaskName> = Awaited<ReturnType<Tasks[N]>>;
