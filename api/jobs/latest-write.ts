const everyMs = 250;

export interface LatestWrite<T> {
  report: (value: T) => void;
  /** Writes what is left and waits for it. */
  settle: () => Promise<void>;
}

/** Writes the newest of a quick stream of values at most every quarter of a second, one write at a time. Faults are told, not thrown. */
export const latestWrite = <T>(write: (value: T) => Promise<unknown>, onFault: (fault: unknown) => void): LatestWrite<T> => {
  let newest: { value: T } | null = null;
  let timer: NodeJS.Timeout | null = null;
  let writing: Promise<unknown> = Promise.resolve();
  const flush = (): void => {
    timer = null;
    const taken = newest;
    newest = null;
    if (taken) writing = writing.then(() => write(taken.value)).catch(onFault);
  };
  return {
    report: (value) => {
      newest = { value };
      timer ??= setTimeout(flush, everyMs);
    },
    settle: async () => {
      if (timer) clearTimeout(timer);
      flush();
      await writing;
    },
  };
};
