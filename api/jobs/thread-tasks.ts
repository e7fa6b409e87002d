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
};

type Tasks = typeof threadTasks;
export type TaskName = keyof Tasks;
export type TaskInput<N extends TaskName> = Parameters<Tasks[N]>[0];
export type TaskOutput<N extends TaskName> = Awaited<ReturnType<Tasks[N]>>;
