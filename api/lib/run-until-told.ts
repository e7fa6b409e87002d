import type { Logger } from 'pino';

/** The longest a stop may take before the process goes anyway. */
const patienceMs = 20_000;

/**
 * Lets a process run until it is told to stop: by a signal, or because whoever started it is gone. Tells the
 * starter when it is ready. A fault nobody caught is logged and ends the process.
 */
export const runUntilTold = (log: Logger, stop: () => Promise<void>): { end: (code: number) => void } => {
  let ending = false;
  const end = (code: number): void => {
    if (ending) return;
    ending = true;
    setTimeout(() => process.exit(code || 1), patienceMs).unref();
    stop().then(
      () => process.exit(code),
      (fault: unknown) => {
        log.error({ err: fault }, 'stopping failed');
        process.exit(1);
      },
    );
  };
  for (const signal of ['SIGTERM', 'SIGINT'] as const) process.on(signal, () => end(0));
  process.on('disconnect', () => end(0));
  for (const event of ['uncaughtException', 'unhandledRejection'] as const) {
    process.on(event, (fault: unknown) => {
      log.fatal({ err: fault }, event);
      end(1);
    });
  }
  process.send?.('ready');
  return { end };
};
