import { startChild, type Child } from './child.ts';

export interface KeptChild {
  ready: Promise<void>;
  /** Settles with a sentence once the process has ended too often to go on. */
  failed: Promise<string>;
  stop(): Promise<void>;
}

/** A process that ends this often within the window is not started again. */
const most = 5;
const windowMs = 60_000;

/** Starts a process and starts it again when it ends by itself, after a pause that grows. */
export const keepRunning = (name: string, file: string, env: Record<string, string | undefined>, logFile: string, say: (line: string) => void): KeptChild => {
  let stopped = false;
  let current: Child = startChild(name, file, env, logFile);
  const first = current.ready;
  const ends: number[] = [];
  const failed = (async () => {
    for (;;) {
      const sentence = await current.ended;
      if (stopped) return new Promise<string>(() => undefined);
      const now = Date.now();
      ends.push(now);
      const recent = ends.filter((at) => now - at < windowMs).length;
      if (recent >= most) return sentence;
      say(`The ${name} process ended and is started again; its log is ${logFile}.`);
      await new Promise((resolve) => setTimeout(resolve, 200 * 2 ** recent));
      if (stopped) return new Promise<string>(() => undefined);
      current = startChild(name, file, env, logFile);
    }
  })();
  return {
    ready: first,
    failed,
    stop: async () => {
      stopped = true;
      await current.stop();
    },
  };
};
