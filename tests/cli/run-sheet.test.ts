import { spawnSync } from 'node:child_process';
import { existsSync, mkdtempSync, readdirSync, readFileSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { afterAll, describe, expect, test } from 'vitest';
import { runSheetCommand } from '#api/cli/run-sheet.ts';
import { readRunSheet } from '#shared/formats/read-run-sheet.ts';

const root = fileURLToPath(new URL('../../', import.meta.url));
const folder = mkdtempSync(join(tmpdir(), 'evenbeam-sheet-'));
afterAll(() => rmSync(folder, { recursive: true }));

interface Ran { status: number | null; stdout: string; stderr: string }

/** The command as a laboratory types it. */
function runByNpm(...args: string[]): Ran {
  const { status, stdout, stderr } = spawnSync('npm', ['run', '--silent', 'run-sheet', '--', ...args], { cwd: root, encoding: 'utf8' });
  return { status, stdout, stderr };
}

/** The same command in this process. */
function run(...args: string[]): Ran {
  const ran: Ran = { status: null, stdout: '', stderr: '' };
  ran.status = runSheetCommand(args, { out: (text) => { ran.stdout += text; }, err: (text) => { ran.stderr += text; } });
  return ran;
}

describe('npm run run-sheet', () => {
  test('prints an unsealed sheet of exactly the circuits asked for, without number, device or time', () => {
    const { status, stdout, stderr } = runByNpm('--class', 'quarter-turn-1q/1', '--circuits', '77', '--shots', '500', '--seed', '0A');
    expect([status, stderr]).toEqual([0, '']);
    const reading = readRunSheet(Buffer.from(stdout));
    expect(reading).toMatchObject({ ok: true, sheet: { id: null, gateClass: 'quarter-turn-1q/1', shots: 500, seed: '0a', sealSha256: null, device: null, drawnAt: null } });
    expect(reading.ok && reading.sheet.patches.map(({ circuits, sealed }) => [circuits.length, sealed])).toEqual([[77, 0]]);
  });

  test('--out writes the same file for the same seed, and leaves nothing beside it', () => {
    const args = ['--class', 'half-turn-1q/1', '--circuits', '30', '--shots', '10', '--seed', 'ff'];
    const out = join(folder, 'sheet.json');
    expect(run(...args, '--out', out)).toEqual({ status: 0, stdout: '', stderr: '' });
    expect(readFileSync(out, 'utf8')).toBe(run(...args).stdout);
    expect(readdirSync(folder)).toEqual(['sheet.json']);
  });

  test.each([
    ['no arguments', [], '--class is missing'],
    ['an unknown class', ['--class', 'nope/1', '--circuits', '5', '--shots', '5'], 'no gate class "nope/1"'],
    ['circuits that are no number', ['--class', 'half-turn-1q/1', '--circuits', '1e2', '--shots', '5'], '--circuits must be a whole number from 1 to 20000; it is "1e2"'],
    ['no shots', ['--class', 'half-turn-1q/1', '--circuits', '9', '--shots', '0'], '--shots must be'],
    ['an odd seed', ['--class', 'half-turn-1q/1', '--circuits', '9', '--shots', '5', '--seed', 'abc'], '--seed must be'],
    ['an unknown option', ['--clas', 'half-turn-1q/1'], "'--clas'"],
    ['too few circuits for any sound sheet', ['--class', 'half-turn-1q/1', '--circuits', '3', '--shots', '5', '--seed', '00'], 'No sheet of 3 circuits was sound'],
  ])('%s: exit 2, a sentence on standard error, nothing on standard output', (_, args, words) => {
    const { status, stdout, stderr } = run(...args);
    expect([status, stdout]).toEqual([2, '']);
    expect(stderr).toContain(words);
  });

  test('the exit status and the sentence reach the shell', () => {
    const { status, stdout, stderr } = runByNpm('--class', 'nope/1');
    expect([status, stdout, stderr]).toEqual([2, '', 'There is no gate class "nope/1".\n']);
  });

  test('a place that cannot be written: exit 2 and no half file', () => {
    const out = join(folder, 'no-such-folder', 'sheet.json');
    const { status, stderr } = run('--class', 'half-turn-1q/1', '--circuits', '30', '--shots', '10', '--out', out);
    expect([status, existsSync(out)]).toEqual([2, false]);
    expect(stderr).toContain('could not be written');
  });
});
