import { useEffect, useRef, useState } from 'react';
import type { FileReading } from './read-dataset-file.ts';

export type FileState = { stage: 'none' } | { stage: 'reading'; file: File } | { stage: 'read'; file: File; reading: FileReading };

const failed: FileReading = { ok: false, errors: [{ pointer: '', message: 'This browser could not read the file.' }] };

/** Reads a chosen file in a worker of its own; choosing another stops the first. */
export function useFileReading(): { state: FileState; choose: (file: File) => void; clear: () => void } {
  const [state, setState] = useState<FileState>({ stage: 'none' });
  const worker = useRef<Worker | null>(null);
  const stop = (): void => {
    worker.current?.terminate();
    worker.current = null;
  };
  useEffect(() => stop, []);

  const choose = (file: File): void => {
    stop();
    setState({ stage: 'reading', file });
    const reader = new Worker(new URL('../workers/read-dataset.worker.ts', import.meta.url), { type: 'module' });
    worker.current = reader;
    const finish = (reading: FileReading): void => {
      if (worker.current !== reader) return;
      stop();
      setState({ stage: 'read', file, reading });
    };
    reader.onmessage = (event: MessageEvent<FileReading>) => finish(event.data);
    reader.onerror = () => finish(failed);
    reader.postMessage(file);
  };
  const clear = (): void => {
    stop();
    setState({ stage: 'none' });
  };
  return { state, choose, clear };
}
