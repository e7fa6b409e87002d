import { it } from 'vitest';

/** Tests that follow one another: after one has failed the rest are skipped, since they begin where it should have ended. */
export const useSteps = (): ((title: string, run: () => Promise<void>) => void) => {
  let failed = '';
  return (title, run) =>
    it(title, async (context) => {
      if (failed !== '') context.skip(`"${failed}" failed`);
      try {
        await run();
      } catch (fault) {
        failed = title;
        throw fault;
      }
    });
};
