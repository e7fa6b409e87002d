/** Asks the registry how it is until it answers "ok"; gives up after two minutes: a machine busy with other work takes half a minute to load it. */
export const waitForHealth = async (base: string, patienceMs = 120_000): Promise<void> => {
  const until = Date.now() + patienceMs;
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
  throw new Error(`The registry at ${base} did not become healthy within ${patienceMs / 1000} s: ${last}`);
};
