import { spawnSync } from 'node:child_process';
import { mkdtempSync, readdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { gzipSync } from 'node:zlib';
import { afterAll, describe, expect, test } from 'vitest';
import type { Result } from '#shared/formats/types.ts';
import { workedExample } from '#tests/shared/method/worked-example.ts';

const root = fileURLToPath(new URL('../..', import.meta.url));
const folder = mkdtempSync(join(tmpdir(), 'evenbeam-estimate-'));
const quarter = join(root, 'tests/reference/m1/quarter.dataset.json');
const circuits = join(root, 'tests/reference/m1/quarter.circuits.json');

afterAll(() => rmSync(folder, { recursive: true }));

function run(...args: string[]) {
  const { status, stdout, stderr } = spawnSync(process.execPath, ['--import', 'tsx', join(root, 'api/cli/estimate.ts'), ...args], { cwd: root, encoding: 'utf8' });
  return { status, stdout, stderr };
}

function file(name: string, content: string | Uint8Array): string {
  const path = join(folder, name);
  writeFileSync(path, content);
  return path;
}

describe('npm run estimate', () => {
  test('exit 0: the result alone on standard output, named by the content id; the seconds on standard error', () => {
    const { status, stdout, stderr } = run(quarter, '--predict', circuits, '--replicates', '20');
    expect(status).toBe(0);
    const result = JSON.parse(stdout) as Result;
    expect([result.format, result.method, result.replicates, result.sealed]).toEqual(['evenbeam.result', 'M1', 20, 0]);
    expect(result.datasetSha256).toBe(workedExample('quarter').contentId);
    expect(result.predictions.length).toBe(40);
    expect(stderr).toMatch(/^\d+\.\d seconds\n$/);
  });

  test('a gzip file gives the same bytes; --out writes the whole result and leaves nothing else', () => {
    const packed = file('quarter.json.gz', gzipSync(readFileSync(quarter)));
    const out = join(folder, 'result.json');
    const { status, stdout } = run(packed, '--replicates', '5', '--out', out);
    expect([status, stdout]).toEqual([0, '']);
    expect(readFileSync(out, 'utf8')).toBe(run(quarter, '--replicates', '5').stdout);
    expect(readdirSync(folder).filter((f) => f.includes('part'))).toEqual([]);
  });

  test('exit 2: each fault as pointer and sentence, nothing on standard output', () => {
    const dataset = JSON.parse(readFileSync(quarter, 'utf8')) as { patches: { circuits: { counts: Record<string, number> }[] }[] };
    dataset.patches[0]!.circuits[3]!.counts = { 0: 1, 1: 1 };
    const { status, stdout, stderr } = run(file('broken.json', JSON.stringify(dataset)));
    expect([status, stdout]).toEqual([2, '']);
    expect(stderr).toMatch(/^\/patches\/0\/circuits\/3\/counts: .*2.*1000/m);
  });

  test.each([
    ['a file that is not there', [join(folder, 'none.json')], /cannot be read \(ENOENT\)/],
    ['no file', [], /Name one dataset file/],
    ['an unknown option', [quarter, '--fast'], /'--fast'/],
    ['replicates that are no whole number', [quarter, '--replicates', '1e3'], /--replicates takes a whole number from 1 to 50000, not "1e3"/],
    ['more replicates than can be held', [quarter, '--replicates', '99999999999'], /--replicates takes a whole number from 1 to 50000, not "99999999999"/],
    ['circuits that are a dataset', [quarter, '--predict', quarter], /quarter\.dataset\.json/],
    ['a place that cannot be written', [quarter, '--replicates', '2', '--out', join(folder, 'no', 'such', 'place.json')], /cannot be written/],
  ] as const)('exit 2: %s', (_, args, sentence) => {
    const { status, stdout, stderr } = run(...args);
    expect([status, stdout]).toEqual([2, '']);
    expect(stderr).toMatch(sentence);
    expect(stderr).not.toMatch(/\n\s+at /);
  });
});
