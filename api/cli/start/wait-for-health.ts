/** Asks the registry how it is until it answers "ok"; gives up after half a minute. */
export const waitForHealth = async (base: string): Promise<void> => {
  const until = Date.now() + 30_000;
  let last = 'no answer';
  while (Date.now() < until) {
    try {
      const answer = await fetch(`${base}/api/health`, { signal: AbortSignal.timeout(5_000) });
      if (answer.ok) return;
      last = `${answer.status} ${await answer.text()}`;
    } catch (fault) {
      last = fault instanceof Error ? fault.message : String(fault);
    }
    await new Promise((resolve) => setTimeout(resolve, 100));
  }
  throw new Error(`The registry at ${base} did not become healthy within 30 s: ${last}`);
};
