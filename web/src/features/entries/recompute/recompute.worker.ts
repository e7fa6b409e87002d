import { RecomputeStopped } from './fetch-file.ts';
import type { RecomputeFault, RecomputeMessage, RecomputeRequest } from './messages.ts';
import { runRecompute } from './run.ts';

/** One entry recomputed off the page's thread. One request, one answer; whoever gives up ends the worker. */
declare const self: DedicatedWorkerGlobalScope;

const post = (message: RecomputeMessage): void => self.postMessage(message);

const faultOf = (error: unknown): RecomputeFault => {
  if (error instanceof RecomputeStopped) return error.fault;
  // What engines throw where an array or a WebAssembly memory cannot be had.
  if (error instanceof RangeError && /alloc|memory|array length|buffer/i.test(error.message)) {
    return { title: 'This browser has not enough memory', detail: 'A pair needs about 700 MB. Close other tabs and try again, or use the command beside.', again: true };
  }
  return { title: 'The estimate stopped', detail: `${error instanceof Error ? error.message : String(error)}. The command beside may tell more.`, again: true };
};

self.onmessage = ({ data }: MessageEvent<RecomputeRequest>) => {
  void runRecompute(data, (progress) => post({ kind: 'progress', ...progress })).then(
    (outcome) => post({ kind: 'done', ...outcome }),
    (error: unknown) => post({ kind: 'fault', ...faultOf(error) }),
  );
};
