import { chmodSync, mkdtempSync, readFileSync, statSync, writeFileSync } from 'node:fs';
import { createServer } from 'node:net';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { spawn } from 'node:child_process';
import { describe, expect, it } from 'vitest';
import { parseEnvironment, launcherSchema } from '#api/config/environment.ts';
import { freePort, portIsTaken } from '#api/cli/free-port.ts';
import { keepRunning } from '#api/cli/start/keep-running.ts';
import { takeLock } from '#api/cli/start/lock.ts';
import { readSecrets } from '#api/cli/start/secrets.ts';
import { tallyOf } from '#api/cli/test/tally.ts';

const folder = mkdtempSync(join(tmpdir(), 'evenbeam-start-'));

describe('the lock of a folder', () => {
  it('is refused while another launcher lives, and taken over from a dead one or a number used again', async () => {
    const file = join(folder, 'start.pid');
    const launcher = spawn(process.execPath, ['-e', 'setTimeout(() => undefined, 60000)', 'api/cli/start.ts'], { stdio: 'ignore' });
    writeFileSync(file, String(launcher.pid));
    expect(() => takeLock(file)).toThrow(`already started from this folder (process ${launcher.pid})`);
    const gone = new Promise((resolve) => launcher.once('exit', resolve));
    launcher.kill('SIGKILL');
    await gone;
    takeLock(file)();
    writeFileSync(file, '1');
    const release = takeLock(file);
    expect(readFileSync(file, 'utf8')).toBe(String(process.pid));
    release();
    writeFileSync(file, '');
    takeLock(file)();
  });
});

describe('secrets', () => {
  it('are drawn once, kept for the owner’s eyes only, and a spoilt file is not written over', () => {
    const file = join(folder, 'secrets.json');
    const first = readSecrets(file);
    expect(readSecrets(file)).toEqual(first);
    expect(statSync(file).mode & 0o777).toBe(0o600);
    expect(new Set(Object.values(first)).size).toBe(6);
    const { log, ...older } = first;
    writeFileSync(file, JSON.stringify(older));
    const completed = readSecrets(file);
    expect(completed, 'a file from before there was a log gets a key of its own').toMatchObject(older);
    expect([completed.log === log, readSecrets(file).log === completed.log]).toEqual([false, true]);
    writeFileSync(file, '{"admin": 1}');
    expect(() => readSecrets(file)).toThrow('is not as this program wrote it');
    expect(readFileSync(file, 'utf8')).toBe('{"admin": 1}');
  });
});

describe('ports', () => {
  it('in use are noticed', async () => {
    const port = await freePort();
    expect(await portIsTaken(port, '127.0.0.1')).toBe(false);
    const server = createServer();
    await new Promise<void>((resolve) => server.listen(port, '127.0.0.1', resolve));
    expect(await portIsTaken(port, '127.0.0.1')).toBe(true);
    await new Promise((resolve) => server.close(resolve));
  });
});

describe('settings', () => {
  it('that cannot be used are all named, secrets without their value', () => {
    expect(() => parseEnvironment(launcherSchema, { PORT: '70000', DATABASE_URL: 'mysql://u:hush@h/d', LOG_LEVEL: 'loud' })).toThrow(/PORT = "70000": .*\n.*DATABASE_URL: .*\n.*LOG_LEVEL = "loud"|LOG_LEVEL = "loud"[^]*DATABASE_URL/);
    expect(() => parseEnvironment(launcherSchema, { DATABASE_URL: 'mysql://u:hush@h/d' })).not.toThrow(/hush/);
    expect(parseEnvironment(launcherSchema, { PORT: '' }).PORT).toBe(8080);
  });
});

describe('a kept process', () => {
  it('is started again when it ends, and given up with the end of its log when it ends too often', async () => {
    const script = join(folder, 'dying.mjs');
    const log = join(folder, 'dying.log');
    writeFileSync(script, "process.send('ready'); console.log('about to fail'); setTimeout(() => process.exit(3), 20);");
    const said: string[] = [];
    const kept = keepRunning('dying', script, { PATH: '/usr/bin' }, log, (line) => said.push(line));
    await kept.ready;
    expect(await kept.failed).toContain('about to fail');
    expect(said).toHaveLength(4);
    await kept.stop();
  });

  it('that ends before it is ready tells why', async () => {
    const script = join(folder, 'broken.mjs');
    writeFileSync(script, "console.error('no such setting'); process.exit(1);");
    chmodSync(script, 0o644);
    const kept = keepRunning('broken', script, { PATH: '/usr/bin' }, join(folder, 'broken.log'), () => undefined);
    await expect(kept.ready).rejects.toThrow('no such setting');
    await kept.stop();
  });
});

describe('the tally of a test run', () => {
  it('counts files that could not be read, runs that failed outside a test, and runs without a report', () => {
    const file = join(folder, 'report.json');
    const write = (numPassedTests: number, numFailedTests: number, statuses: string[]): void =>
      writeFileSync(file, JSON.stringify({ numPassedTests, numFailedTests, testResults: statuses.map((status) => ({ name: 'x', status, assertionResults: [] })) }));
    write(7, 0, ['passed']);
    expect(tallyOf(file, 0)).toEqual({ passed: 7, failed: 0 });
    expect(tallyOf(file, 1)).toEqual({ passed: 7, failed: 1 });
    write(7, 2, ['failed']);
    expect(tallyOf(file, 1)).toEqual({ passed: 7, failed: 3 });
    expect(tallyOf(join(folder, 'none.json'), 0)).toEqual({ passed: 0, failed: 1 });
  });
});
