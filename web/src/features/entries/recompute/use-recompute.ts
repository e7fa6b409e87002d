import { useCallback, useEffect, useRef, useState } from 'react';
import type { RecomputeFault, RecomputeMessage, RecomputeOutcome, RecomputeProgress, RecomputeRequest } from './messages.ts';

export type RecomputeState =
  | { phase: 'idle'; cancelled: boolean }
  | { phase: 'running'; progress: RecomputeProgress }
  | { phase: 'done'; outcome: RecomputeOutcome }
  | { phase: 'fault'; fault: RecomputeFault };

const beginning: RecomputeProgress = { stage: 'files', fraction: 0, replicatesDone: null, replicates: null };
const noWorker: RecomputeFault = { title: 'The estimate could not be started', detail: 'This browser ended the estimate or did not let it begin, mostly for want of memory. Close other tabs and try again, or use the command beside.', again: true };

const nextState = (message: RecomputeMessage): RecomputeState => {
  const { kind, ...rest } = message;
  if (kind === 'progress') return { phase: 'running', progress: rest as RecomputeProgress };
  return kind === 'done' ? { phase: 'done', outcome: rest as RecomputeOutcome } : { phase: 'fault', fault: rest as RecomputeFault };
};

/** A run of the recomputation in a worker of its own. Cancelling, leaving the page and ending all terminate the worker: nothing stays behind. */
export function useRecompute(request: RecomputeRequest): { state: RecomputeState; start: () => void; cancel: () => void } {
  const [state, setState] = useState<RecomputeState>({ phase: 'idle', cancelled: false });
  const worker = useRef<Worker | null>(null);
  const stop = useCallback(() => {
    worker.current?.terminate();
    worker.current = null;
  }, []);
  useEffect(() => stop, [stop]);
  const start = (): void => {
    stop();
    setState({ phase: 'running', progress: beginning });
    try {
      const own = new Worker(new URL('./recompute.worker.ts', import.meta.url), { type: 'module' });
      worker.current = own;
      own.onmessage = ({ data }: MessageEvent<RecomputeMessage>) => {
        if (worker.current !== own) return;
        if (data.kind !== 'progress') stop();
        setState(nextState(data));
      };
      own.onerror = (event) => {
        event.preventDefault();
        if (worker.current !== own) return;
        stop();
        setState({ phase: 'fault', fault: noWorker });
      };
      own.postMessage(request);
    } catch {
      stop();
      setState({ phase: 'fault', fault: noWorker });
    }
  };
  const cancel = (): void => {
    stop();
    setState({ phase: 'idle', cancelled: true });
  };
  return { state, start, cancel };
}
