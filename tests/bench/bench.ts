/**
 * Speed of the method beside the same job scripted with numpy, both in this run on this machine, turn by turn, so that the load
 * of the hour falls on both; medians of five. Ends with a table for DEVELOPERS.md.
 * `npm run bench` measures everything; `npm run bench -- one`, `pair` or `chained` a part; `-- pair 3` takes three runs.
 */
import { spawnSync } from 'node:child_process';
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { loadavg, tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { benchJob } from '#tests/bench/bench-dataset.ts';
import { chainedLine } from '#tests/bench/chained-dataset.ts';
import { timeChained } from '#tests/bench/chained-job.ts';
import { STAGES, timeJoint, type Seconds } from '#tests/bench/joint-job.ts';
import { runNumpy } from '#tests/bench/numpy-yardstick.ts';
import { markdown, median, ratio, seconds } from '#tests/bench/tables.ts';

const REPLICATES = 2000;
/** Fewer suffice to compare sizes: both cost the same share. */
const CHAINED_REPLICATES = 500;
const rows: string[][] = [];

const ownProcess = (file: string): { seconds: number; mebibytes: number } => {
  const run = spawnSync(process.execPath, ['--import', 'tsx', fileURLToPath(new URL('./own-process.ts', import.meta.url)), file, String(REPLICATES)], { encoding: 'utf8' });
  if (run.status !== 0) throw new Error(`The estimate in a process of its own ended with status ${String(run.status)}: ${run.stderr}`);
  return JSON.parse(run.stdout) as { seconds: number; mebibytes: number };
};

function measureJoint(name: string, classId: string, circuits: number, runs: number): void {
  const job = benchJob(classId, circuits);
  const folder = mkdtempSync(join(tmpdir(), 'evenbeam-bench-'));
  const file = join(folder, 'dataset.json');
  const text = JSON.stringify(job.dataset);
  writeFileSync(file, text);
  const ours: Seconds[] = [];
  const own: ReturnType<typeof ownProcess>[] = [];
  const theirs: Record<string, number>[] = [];
  let reason = '';
  for (let run = 0; run < runs; run++) {
    ours.push(timeJoint(text, job.gateClass, REPLICATES));
    own.push(ownProcess(file));
    const numpy = runNumpy(file, REPLICATES);
    if ('reason' in numpy) reason = numpy.reason;
    else theirs.push(numpy.seconds);
    console.log(`${job.name}, run ${run + 1} of ${runs}: ${seconds(ours.at(-1)!.total)}${theirs.length > 0 ? `, numpy ${seconds(theirs.at(-1)!.total!)}` : ''}`);
  }
  rmSync(folder, { recursive: true });
  if (reason !== '') console.log(reason);
  const add = (what: string, stage: keyof Seconds, bar: string): void => {
    const mine = median(ours.map((r) => r[stage]));
    const other = theirs.length > 0 ? median(theirs.map((r) => r[stage] ?? NaN)) : NaN;
    rows.push([`${name}: ${what}`, seconds(mine), Number.isFinite(other) ? seconds(other) : '', Number.isFinite(other) ? ratio(mine / other) : '', bar]);
  };
  add(`${circuits} circuits, ${REPLICATES} replicates`, 'total', '0.5');
  for (const stage of STAGES) add(stage, stage, stage === 'inverse' && name === 'pair' ? '0.35' : '');
  add('misfit and all further figures', 'rest', '');
  rows.push([`${name}: whole estimate in a process of its own`, seconds(median(own.map((r) => r.seconds))), '', '', '']);
  rows.push([`${name}: peak memory of that process`, `${Math.max(...own.map((r) => r.mebibytes)).toFixed(0)} MiB`, '', '', name === 'pair' ? '700 MiB' : '']);
}

function measureChained(runs: number): void {
  const sizes = [5, 20];
  const data = sizes.map(chainedLine);
  const found: number[][] = sizes.map(() => []);
  // Once beforehand, so that neither size pays for what the engine has yet to compile.
  timeChained(data[0]!, CHAINED_REPLICATES);
  for (let run = 0; run < runs; run++) {
    sizes.forEach((_, i) => found[i]!.push(timeChained(data[i]!, CHAINED_REPLICATES)));
    console.log(`chained lines, run ${run + 1} of ${runs}: ${sizes.map((n, i) => `${n} qubits ${seconds(found[i]!.at(-1)!)}`).join(', ')}`);
  }
  const each = sizes.map((n, i) => median(found[i]!) / n);
  sizes.forEach((n, i) => rows.push([`chained line of ${n}: each qubit, ${CHAINED_REPLICATES} replicates`, seconds(each[i]!), '', i === 0 ? '' : `${ratio(each[i]! / each[0]!)} of 5 qubits`, i === 0 ? '' : '1.2']));
  const patch = sizes.map((n, i) => median(found[i]!) / (2 * n - 1));
  rows.push(['chained line of 20: each patch', seconds(patch[1]!), '', `${ratio(patch[1]! / patch[0]!)} of 5 qubits`, '']);
}

const [part = 'all', given = '5'] = process.argv.slice(2);
const runs = Number(given);
if (!['all', 'one', 'pair', 'chained'].includes(part) || !Number.isSafeInteger(runs) || runs < 1) {
  console.error(`Usage: npm run bench -- [one | pair | chained] [runs], not ${process.argv.slice(2).join(' ')}`);
  process.exit(2);
}
const before = loadavg()[0]!;
if (part === 'all' || part === 'one') measureJoint('one qubit', 'quarter-turn-1q/1', 300, runs);
if (part === 'all' || part === 'pair') measureJoint('pair', 'quarter-turn-cz-2q/1', 1600, runs);
if (part === 'all' || part === 'chained') measureChained(runs);
console.log(`\nNode ${process.version}, medians of ${runs}, load average ${before.toFixed(1)} at the start and ${loadavg()[0]!.toFixed(1)} at the end\n`);
console.log(markdown(['job', 'this method', 'numpy script', 'ratio', 'bar'], rows));
