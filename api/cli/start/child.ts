import { fork } from 'node:child_process';
import { createWriteStream, mkdirSync, readFileSync } from 'node:fs';
import { dirname } from 'node:path';

export interface Child {
  /** Settles when the process has said that it is ready; rejects if it ends before. */
  ready: Promise<void>;
  /** Settles with a sentence when the process has ended. */
  ended: Promise<string>;
  stop(): Promise<void>;
}

const graceMs = 25_000;

/**
 * Starts one of our processes in a group of its own (a Ctrl-C at the terminal reaches the launcher only), its log
 * to a file. The channel lets it notice when the launcher is gone.
 */
export const startChild = (name: string, file: string, env: Record<string, string | undefined>, logFile: string): Child => {
  mkdirSync(dirname(logFile), { recursive: true });
  const log = createWriteStream(logFile, { flags: 'a' });
  const child = fork(file, [], { env, execArgv: ['--enable-source-maps', '--disable-warning=DeprecationWarning'], stdio: ['ignore', 'pipe', 'pipe', 'ipc'], detached: true });
  child.stdout?.pipe(log, { end: false });
  child.stderr?.pipe(log, { end: false });
  const ended = new Promise<string>((resolve) => {
    child.once('exit', (code, signal) => {
      log.end(() => {
        const tail = readFileSync(logFile, 'utf8').trim().split('\n').slice(-6).join('\n');
        resolve(`The ${name} process ended (${signal ?? `exit ${code}`}). The end of ${logFile}:\n${tail}`);
      });
    });
  });
  const ready = new Promise<void>((resolve, reject) => {
    child.once('message', () => resolve());
    void ended.then((sentence) => reject(new Error(sentence)));
  });
  ready.catch(() => undefined);
  return {
    ready,
    ended,
    stop: async () => {
      if (child.exitCode === null && child.signalCode === null) {
        child.kill('SIGTERM');
        const last = setTimeout(() => child.kill('SIGKILL'), graceMs);
        await ended;
        clearTimeout(last);
      }
    },
  };
};
