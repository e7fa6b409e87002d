/**
 * Median times of the method beside the same job scripted with numpy, both in this run on this machine, turn by turn, so
 * that the load of the hour falls on both. `npm run bench` measures one qubit and a pair; `npm run bench -- one` or `pair` one of them.
 */
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { contentIdOf } from '#shared/formats/canonical-json.ts';
import { estimate } from '#shared/method/estimate.ts';
import { benchJob, type BenchJob } from '#tests/bench/bench-dataset.ts';
import { runNumpy } from '#tests/bench/numpy-yardstick.ts';

const REPLICATES = 2000;
const STAGES = ['design', 'inverse', 'passes', 'replicates', 'figures'] as const;

function median(values: readonly number[]): number {
  const sorted = [...values].sort((a, b) => a - b);
  const middle = sorted.length >> 1;
  return sorted.length % 2 === 1 ? sorted[middle]! : (sorted[middle - 1]! + sorted[middle]!) / 2;
}

/** Seconds of one estimate by stage. */
function time(job: BenchJob, contentId: string): Record<string, number> {
  const seconds: Record<string, number> = {};
  const start = performance.now();
  let last = start;
  let stage = 'design';
  estimate({
    dataset: job.dataset, contentId, gateClass: job.gateClass, replicates: REPLICATES,
    onProgress: (p) => {
      const now = performance.now();
      seconds[stage] = (seconds[stage] ?? 0) + (now - last) / 1000;
      stage = p.stage;
      last = now;
    },
  });
  const end = performance.now();
  seconds[stage] = (seconds[stage] ?? 0) + (end - last) / 1000;
  seconds['total'] = (end - start) / 1000;
  return seconds;
}

function measure(job: BenchJob, runs: number): void {
  const folder = mkdtempSync(join(tmpdir(), 'evenbeam-bench-'));
  const file = join(folder, 'dataset.json');
  writeFileSync(file, JSON.stringify(job.dataset));
  const contentId = contentIdOf(job.dataset);
  const ours: Record<string, number>[] = [];
  const theirs: Record<string, number>[] = [];
  let reason = '';
  for (let run = 0; run < runs; run++) {
    ours.push(time(job, contentId));
    if (reason !== '') continue;
    const numpy = runNumpy(file, REPLICATES);
    if ('reason' in numpy) reason = numpy.reason;
    else theirs.push(numpy.seconds);
  }
  rmSync(folder, { recursive: true });
  console.log(`\n${job.name}, ${REPLICATES} replicates, median of ${runs} runs, seconds`);
  console.log(`${'stage'.padEnd(12)}${'this method'.padStart(14)}${theirs.length > 0 ? `${'numpy'.padStart(10)}${'ratio'.padStart(8)}` : ''}`);
  for (const stage of [...STAGES, 'total']) {
    const a = median(ours.map((r) => r[stage] ?? 0));
    const b = theirs.length > 0 ? median(theirs.map((r) => r[stage] ?? 0)) : 0;
    console.log(`${stage.padEnd(12)}${a.toFixed(3).padStart(14)}${theirs.length > 0 ? `${b.toFixed(3).padStart(10)}${(b > 0 ? (a / b).toFixed(2) : '').padStart(8)}` : ''}`);
  }
  console.log(`first run ${ours[0]!['total']!.toFixed(3)} s`);
  if (reason !== '') console.log(reason);
}

const asked = process.argv[2];
if (asked !== 'pair') measure(benchJob('quarter-turn-1q/1', 300), 7);
if (asked !== 'one') measure(benchJob('quarter-turn-cz-2q/1', 1600), 3);
