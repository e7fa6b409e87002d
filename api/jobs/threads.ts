import { MessageChannel } from 'node:worker_threads';
import { availableParallelism } from 'node:os';
import { Piscina } from 'piscina';
import type { TaskInput, TaskName, TaskOutput } from './thread-tasks.ts';

export interface ThreadProgress {
  stage: string;
  fraction: number;
  /** Replicates done so far, where that is the stage. */
  replicatesDone?: number;
}

export type RunInThread = <N extends TaskName>(name: N, input: TaskInput<N>, options?: { signal?: AbortSignal; onProgress?: (progress: ThreadProgress) => void }) => Promise<TaskOutput<N>>;

export interface ThreadPool {
  run: RunInThread;
  stop(): Promise<void>;
}

/**
 * A pool of worker threads for the tasks of thread-tasks.ts. From source the entry goes through tsx; a bundle
 * names its own entry file. Threads start when first needed and go after a minute idle.
 */
export const startThreads = (options: { threads?: number | undefined; file?: string | undefined } = {}): ThreadPool => {
  const filename = options.file ?? new URL('./thread-from-source.mjs', import.meta.url).href;
  const pool = new Piscina({
    filename,
    minThreads: 0,
    maxThreads: options.threads ?? Math.max(1, availableParallelism() - 1),
    idleTimeout: 60_000,
  });
  // A thread that dies rejects the task it had; without a listener it would take the process with it.
  pool.on('error', () => undefined);
  return {
    run: async (name, input, { signal, onProgress } = {}) => {
      const { port1, port2 } = new MessageChannel();
      port1.on('message', (progress: ThreadProgress) => onProgress?.(progress));
      port1.unref();
      try {
        return await pool.run({ name, input, port: port2 }, { transferList: [port2], ...(signal ? { signal } : {}) });
      } finally {
        port1.close();
      }
    },
    stop: () => pool.destroy(),
  };
};
