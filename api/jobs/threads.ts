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

/** First word of a thread that has taken a task up. */
export const begunWord = 'begun';

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
  /** Calls that no thread has taken up yet. */
  const waiting = new Set<AbortController>();
  // A thread that dies rejects the task it had. One that cannot start has none: without this, calls would wait for it for ever.
  pool.on('error', (fault: unknown) => {
    for (const call of waiting) call.abort(new Error(`A worker thread could not start: ${fault instanceof Error ? fault.message : String(fault)}`));
  });
  return {
    run: async (name, input, { signal, onProgress } = {}) => {
      const { port1, port2 } = new MessageChannel();
      const start = new AbortController();
      waiting.add(start);
      port1.on('message', (message: ThreadProgress | typeof begunWord) => {
        if (message === begunWord) waiting.delete(start);
        else onProgress?.(message);
      });
      port1.unref();
      try {
        return await pool.run({ name, input, port: port2 }, { transferList: [port2], signal: signal ? AbortSignal.any([signal, start.signal]) : start.signal });
      } catch (fault) {
        throw start.signal.aborted && !signal?.aborted ? start.signal.reason : fault;
      } finally {
        waiting.delete(start);
        port1.close();
      }
    },
    stop: () => pool.destroy(),
  };
};
