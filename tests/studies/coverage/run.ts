/**
 * Coverage study. `npm run study:coverage` goes on where it stopped, on both cores, until every cell has its trials;
 * SIGINT and SIGTERM stop it at once, what is unfinished is run again. `-- --minutes 30` stops by itself.
 * `-- --summarise` writes shared/studies/coverage.json from what there is.
 */
import { fork, type ChildProcess } from 'node:child_process';
import { writeFileSync } from 'node:fs';
import { availableParallelism } from 'node:os';
import { build } from 'esbuild';
import { cellId, cells, steps } from '#tests/studies/coverage/cells.ts';
import type { ChunkResult } from '#tests/studies/coverage/chunk.ts';
import { nextOfSteps } from '#tests/studies/coverage/schedule.ts';
import { summarise, writeStudy } from '#tests/studies/coverage/summarise.ts';
import { WorkFile } from '#tests/studies/coverage/work-file.ts';

const WORK = '.data/studies/coverage.ndjson';
const WORKER = '.data/studies/coverage-worker.mjs';
const OUT = 'shared/studies/coverage.json';

function option(name: string): string | null {
  const at = process.argv.indexOf(name);
  return at < 0 ? null : (process.argv[at + 1] ?? '');
}

const work = new WorkFile(WORK);
if (process.argv.includes('--summarise')) {
  const study = summarise(work.results, cells, new Date().toISOString().slice(0, 10));
  writeFileSync(OUT, writeStudy(study));
  console.log(`${study.cells.length} cells, ${study.cells.reduce((n, c) => n + c.trials, 0)} trials → ${OUT}`);
} else {
  await run();
}

async function run(): Promise<void> {
  // One bundle of the method as it is now: edits of the sources meanwhile change no trial.
  await build({ entryPoints: ['tests/studies/coverage/worker.ts'], bundle: true, platform: 'node', format: 'esm', outfile: WORKER, banner: { js: "import { createRequire } from 'module'; const require = createRequire(import.meta.url);" }, logLevel: 'warning' });
  const minutes = Number(option('--minutes') ?? Infinity);
  const under = new Set<string>();
  const children = Array.from({ length: availableParallelism() }, () => fork(WORKER));
  let stopped = false;
  const stop = (): void => {
    stopped = true;
    for (const child of children) child.kill();
  };
  process.once('SIGINT', stop);
  process.once('SIGTERM', stop);
  const timer = Number.isFinite(minutes) ? setTimeout(stop, minutes * 60_000) : null;
  const give = (child: ChildProcess): void => {
    const taken = (cell: string, chunk: number): boolean => work.has(cell, chunk) || under.has(`${cell} ${chunk}`);
    const task = nextOfSteps(steps, taken);
    if (!task || stopped) return child.disconnect();
    under.add(`${cellId(task.cell)} ${task.chunk}`);
    child.send(task);
  };
  await Promise.all(children.map((child) => new Promise<void>((resolve, reject) => {
    child.on('message', (result: ChunkResult) => {
      work.add(result);
      console.log(`${result.cell}, chunk ${result.chunk}: ${result.trials} trials in ${result.seconds} s`);
      give(child);
    });
    child.once('exit', (code) => (code === 0 || stopped ? resolve() : reject(new Error(`a worker of the study ended with ${code}`))));
    give(child);
  })));
  if (timer) clearTimeout(timer);
  console.log(stopped ? 'Stopped; the same command goes on.' : 'Every cell has its trials.');
}
