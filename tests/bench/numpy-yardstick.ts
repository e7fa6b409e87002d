import { spawnSync } from 'node:child_process';
import { fileURLToPath } from 'node:url';

const script = fileURLToPath(new URL('../reference/bench/m1_numpy.py', import.meta.url));

/** Seconds by stage that the numpy script reports, or a plain sentence why it cannot run here. */
export type NumpyRun = { seconds: Record<string, number> } | { reason: string };

export function runNumpy(file: string, replicates: number): NumpyRun {
  const run = spawnSync('python3', [script, file, String(replicates)], { encoding: 'utf8', env: { ...process.env, OPENBLAS_NUM_THREADS: '2' } });
  if (run.error) return { reason: 'The numpy column is left out: python3 is not installed.' };
  if (run.status !== 0) {
    return { reason: run.stderr.includes('No module named') ? 'The numpy column is left out: python3 has no numpy.' : `The numpy column is left out: the script ended with status ${String(run.status)}.` };
  }
  const { gateLossSE: _, ...seconds } = JSON.parse(run.stdout) as Record<string, number> & { gateLossSE: unknown };
  return { seconds };
}
