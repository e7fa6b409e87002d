import type { MessagePort } from 'node:worker_threads';
import { threadTasks, type TaskInput, type TaskName, type TaskOutput } from './thread-tasks.ts';
import type { begunWord, ThreadProgress } from './threads.ts';

interface Call<N extends TaskName> {
  name: N;
  input: TaskInput<N>;
  port: MessagePort;
}

/** Entry of a worker thread: finds the task and sends its progress through the port given with the call. */
export default async <N extends TaskName>({ name, input, port }: Call<N>): Promise<TaskOutput<N>> => {
  const task = threadTasks[name] as (input: TaskInput<N>, report: (progress: ThreadProgress) => void) => Promise<TaskOutput<N>>;
  port.postMessage('begun' satisfies typeof begunWord);
  try {
    return await task(input, (progress) => port.postMessage(progress));
  } finally {
    port.close();
  }
};
