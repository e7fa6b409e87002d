import { spawn } from 'node:child_process';
import { mkdirSync, rmSync } from 'node:fs';
import { join, resolve } from 'node:path';
import { providePostgres } from './postgres/install.ts';
import { provideChromium } from './test/chromium.ts';
import { tallyOf } from './test/tally.ts';

const say = (line: string): void => console.log(line);
const args = process.argv.slice(2);
const flags = ['--disable-warning=DeprecationWarning'];

let running: ReturnType<typeof spawn> | null = null;
let stopped = false;
const stop = (): void => {
  stopped = true;
  running?.kill('SIGTERM');
};
for (const signal of ['SIGINT', 'SIGTERM', 'SIGHUP'] as const) process.on(signal, stop);
process.on('disconnect', stop);

/** Runs one tool with this Node, its output passed on; gives its exit code. */
const run = (script: string, list: string[]): Promise<number> =>
  new Promise((done, fail) => {
    if (stopped) return done(1);
    running = spawn(process.execPath, [...flags, script, ...list], { stdio: ['ignore', 'inherit', 'inherit'] });
    running.once('error', fail);
    running.once('exit', (code) => done(code ?? 1));
  });

const check = async (title: string, script: string, list: string[]): Promise<boolean> => {
  say(`\n${title} …`);
  const ok = (await run(script, list)) === 0;
  say(ok ? `${title}: passed` : `${title}: failed`);
  return ok;
};

let passed = 0;
let failed = 0;
const count = (ok: boolean): void => void (ok ? (passed += 1) : (failed += 1));

try {
  providePostgres(say);
  provideChromium(say);
  count(await check('Lint', 'node_modules/eslint/bin/eslint.js', ['--max-warnings', '0', '.']));
  count(await check('Type check', 'node_modules/typescript/bin/tsc', ['--noEmit']));
  const folder = resolve('.data/test');
  mkdirSync(folder, { recursive: true });
  const report = join(folder, `report-${process.pid}.json`);
  say('\nTests …');
  const code = await run('node_modules/vitest/vitest.mjs', ['run', '--reporter=default', '--reporter=json', `--outputFile.json=${report}`, ...args]);
  const tally = tallyOf(report, code);
  rmSync(report, { force: true });
  passed += tally.passed;
  failed += tally.failed;
} catch (fault) {
  console.error(fault instanceof Error ? fault.message : String(fault));
  failed += 1;
}
console.log(`\n${passed} passed, ${failed} failed`);
process.exitCode = failed === 0 && !stopped ? 0 : 1;
process.disconnect?.();
