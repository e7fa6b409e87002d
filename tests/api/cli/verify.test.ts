import { spawn } from 'node:child_process';
import { createServer, type Server } from 'node:http';
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import type { AddressInfo } from 'node:net';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { unzipSync, zipSync } from 'fflate';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { readAddress } from '#api/cli/verify/read-address.ts';
import { readArchive } from '#api/cli/verify/read-archive.ts';
import { Unreadable } from '#api/cli/verify/source.ts';
import { verify } from '#api/cli/verify/verify.ts';
import { canonicalJson, contentIdOf, sha256Hex } from '#shared/formats/canonical-json.ts';
import type { Dataset, Result, Seal } from '#shared/formats/types.ts';
import { accepted, withdrawn } from '#tests/support/life.ts';
import { makeDataset, makeDesk, makeDrawnSheet } from '#tests/support/record.ts';
import { asStranger } from '#tests/support/sign-in.ts';
import { useTestApp } from '#tests/support/test-app.ts';

const app = useTestApp();
const folder = mkdtempSync(join(tmpdir(), 'evenbeam-verify-'));
let server: Server;
let base = '';
let accession = '';
let archive: Record<string, Uint8Array> = {};

type Outcome = { status: number | null; stdout: string; stderr: string };
/** The command as it is typed; a process of its own each time. */
const typed = (...args: string[]): Promise<Outcome> =>
  new Promise((done) => {
    const child = spawn(process.execPath, ['--import', 'tsx', 'api/cli/verify.ts', ...args], { stdio: ['ignore', 'pipe', 'pipe'] });
    let [stdout, stderr] = ['', ''];
    child.stdout.on('data', (part: Buffer) => (stdout += part.toString()));
    child.stderr.on('data', (part: Buffer) => (stderr += part.toString()));
    child.on('close', (status) => done({ status, stdout, stderr }));
  });

/** The command without its process. */
const run = async (target: string): Promise<Outcome> => {
  let stdout = '';
  try {
    const status = verify(/^https?:/.test(target) ? await readAddress(target) : readArchive(target), (line) => (stdout += `${line}\n`));
    return { status, stdout, stderr: '' };
  } catch (error) {
    if (!(error instanceof Unreadable)) throw error;
    return { status: 2, stdout, stderr: error.message };
  }
};

const fetched = async (path: string): Promise<Uint8Array> => new Uint8Array(await (await fetch(`${base}${path}`)).arrayBuffer());
const encode = (text: string): Uint8Array => new TextEncoder().encode(text);
const json = <T>(name: string): T => JSON.parse(new TextDecoder().decode(archive[name])) as T;

let serial = 0;
const zipOf = (files: Record<string, Uint8Array>): string => {
  const path = join(folder, `changed-${(serial += 1)}.zip`);
  writeFileSync(path, zipSync(files));
  return path;
};
/** The archive with some files changed, and its facts and list of digests made to fit: a forger who knows the format. */
const forged = (changes: Record<string, Uint8Array>): string => {
  const files = { ...archive, ...changes };
  const facts = {
    ...json<object>('entry.json'), bytesSha256: sha256Hex(files['dataset.json']!), resultSha256: sha256Hex(files['result.json']!), replicatesSha256: sha256Hex(files['replicates.f64']!),
    contentId: contentIdOf(JSON.parse(new TextDecoder().decode(files['dataset.json']))),
  };
  files['entry.json'] = encode(canonicalJson(facts));
  delete files['sha256sums.txt'];
  files['sha256sums.txt'] = encode(Object.entries(files).map(([name, bytes]) => `${sha256Hex(bytes)}  ${name}\n`).join(''));
  return zipOf(files);
};
const withResult = (change: (result: Result) => void): Uint8Array => {
  const result = json<Result>('result.json');
  change(result);
  return encode(canonicalJson(result));
};

beforeAll(async () => {
  const desk = await makeDesk(app());
  ({ accession } = await accepted(app(), desk, makeDataset(desk, await makeDrawnSheet(app(), desk)), { replicates: 60 }));
  server = createServer(app().app);
  await new Promise<void>((done) => server.listen(0, '127.0.0.1', done));
  base = `http://127.0.0.1:${(server.address() as AddressInfo).port}`;
  archive = unzipSync(await fetched(`/api/v1/entries/${accession}/v/1/archive`));
});
afterAll(async () => {
  rmSync(folder, { recursive: true });
  server.closeAllConnections();
  await new Promise((done) => server.close(done));
});

describe('the archive of an entry', () => {
  it('holds every file with its digest, in fixed order, and has the same bytes each time', async () => {
    const [first, second] = [await fetched(`/api/v1/entries/${accession}/v/1/archive`), await fetched(`/api/v1/entries/${accession}/v/1/archive`)];
    expect(sha256Hex(first)).toBe(sha256Hex(second));
    const names = Object.keys(archive);
    expect(names.slice(0, 6)).toEqual(['entry.json', 'dataset.json', 'run-sheet.json', 'seal.json', 'result.json', 'replicates.f64']);
    expect(names.at(-1)).toBe('sha256sums.txt');
    const listed = new TextDecoder().decode(archive['sha256sums.txt']).trim().split('\n').map((line) => line.split('  '));
    expect(listed).toEqual(Object.entries(archive).filter(([name]) => name !== 'sha256sums.txt').map(([name, bytes]) => [sha256Hex(bytes), name]));
    for (const [kind, name] of [['dataset', 'dataset.json'], ['run-sheet', 'run-sheet.json'], ['seal', 'seal.json'], ['result', 'result.json'], ['replicates', 'replicates.f64']] as const)
      expect(sha256Hex(await fetched(`/api/v1/entries/${accession}/v/1/${kind}`)), kind).toBe(sha256Hex(archive[name]!));
  });

  it('is not sent again to who has it, and not there for an entry that does not exist', async () => {
    const reader = asStranger(app());
    const { headers } = await reader('get', `/api/v1/entries/${accession}/v/1/archive`);
    expect(headers).toMatchObject({ 'content-type': 'application/zip', 'content-disposition': `attachment; filename="${accession}.1.zip"` });
    expect((await reader('get', `/api/v1/entries/${accession}/v/1/archive`).set('if-none-match', String(headers.etag))).status).toBe(304);
    expect((await reader('get', '/api/v1/entries/EVB-999999/v/1/archive')).status).toBe(404);
  });
});

describe('npm run verify, all in order', () => {
  it.each([['the page', (a: string) => `/entries/${a}`], ['a version of the page', (a: string) => `/entries/${a}/v/1`], ['the API', (a: string) => `/api/v1/entries/${a}/v/1`], ['a file of the API', (a: string) => `/api/v1/entries/${a}/v/1/dataset`]])('exit 0 for the address of %s', async (_, path) => {
    const { status, stdout, stderr } = await run(`${base}${path(accession)}`);
    expect({ status, stderr }).toEqual({ status: 0, stderr: '' });
    expect(stdout).not.toContain('DIFFERS');
    expect(stdout).toMatch(new RegExp(`All agree: ${accession}\\.1 recomputed is identical, bit for bit\\.\\n$`));
    expect(stdout).toMatch(/agrees {3}Retained signal, depth 16: 0\.\d+, intervals too, identical/);
    expect(stdout).toMatch(/agrees {3}seal against its commitment: the secret fits the digest printed on RS-/);
    expect(stdout).toMatch(/agrees {3}log, leaf against the record: leaf 0 of \d+\nagrees {3}log, proof: leads to the root [0-9a-f]{64}\nagrees {3}log, signature of the head: good/);
  });

  it('exit 0 for the archive, which says where its digests come from', async () => {
    const path = join(folder, 'entry.zip');
    writeFileSync(path, await fetched(`/api/v1/entries/${accession}/v/1/archive`));
    const { status, stdout, stderr } = await typed(path);
    expect(stderr).toBe('');
    expect(status).toBe(0);
    expect(stdout).toMatch(/note {5}record: the recorded digests are the archive’s own/);
    expect(stdout).toContain('note     log: no log proof is published for this entry');
  });
});

describe('npm run verify, exit 1 where something was changed', () => {
  it('one byte of the dataset', async () => {
    const dataset = archive['dataset.json']!.slice();
    dataset[dataset.indexOf(0x0a)] = 0x20;
    const { status, stdout } = await run(zipOf({ ...archive, 'dataset.json': dataset }));
    expect(status).toBe(1);
    expect(stdout).toMatch(/DIFFERS {2}SHA-256 of the dataset as it was sent: recorded [0-9a-f]{64}, found [0-9a-f]{64}/);
    expect(stdout).toMatch(/DIFFERS {2}digests that the archive lists: dataset\.json differs/);
    expect(stdout).toContain('Not all agree: the figures of');
  });

  it('one shot moved in the dataset, every digest made to fit', async () => {
    const dataset = json<Dataset>('dataset.json');
    const { counts } = dataset.patches[0]!.circuits[0]!;
    const [from, to] = counts['0']! > 0 ? ['0', '1'] : ['1', '0'];
    counts[from!]! -= 1;
    counts[to!]! += 1;
    const moved = encode(JSON.stringify(dataset));
    const { status, stdout } = await run(forged({ 'dataset.json': moved, 'result.json': withResult((r) => (r.datasetSha256 = contentIdOf(dataset))) }));
    expect(status).toBe(1);
    expect(stdout).toMatch(/DIFFERS {2}Retained signal, depth 16: \/figures\/\d+\/value frozen 0\.\d+, recomputed 0\.\d+/);
  });

  it('one figure of the result, every digest made to fit: frozen and recomputed value are named', async () => {
    const { status, stdout } = await run(forged({ 'result.json': withResult((r) => (r.figures.find((f) => f.key === 'gate-loss')!.value = 0.0001)) }));
    expect(status).toBe(1);
    expect(stdout).toMatch(/DIFFERS {2}Gate loss, \w+: \/figures\/\d+\/value frozen 0\.0001, recomputed -?[\d.e-]+/);
    expect(stdout.match(/DIFFERS/g)).toHaveLength(2);
    expect(stdout).toContain(`Not all agree: ${accession}.1 recomputed differs from what was frozen`);
  });

  it('a figure moved by 1e-12 is told from the frozen bytes, yet counts as the same figure', async () => {
    const { status, stdout } = await run(forged({ 'result.json': withResult((r) => (r.figures[4]!.value! += 1e-12)) }));
    expect(status).toBe(0);
    expect(stdout).toContain('recomputed is the same within 1e-9, though not bit for bit.');
  });

  it('one replicate', async () => {
    const replicates = archive['replicates.f64']!.slice();
    new DataView(replicates.buffer).setFloat64(0, 0.5, true);
    const plain = await run(zipOf({ ...archive, 'replicates.f64': replicates }));
    expect([plain.status, plain.stdout.includes('DIFFERS  SHA-256 of the frozen replicates')]).toEqual([1, true]);
    const made = await run(forged({ 'replicates.f64': replicates }));
    expect(made.status).toBe(1);
    expect(made.stdout).toMatch(/DIFFERS {2}replicates: recorded [0-9a-f]{64}, recomputed [0-9a-f]{64}, largest difference \d\.\de-\d/);
  });

  it('a seal of another secret, or with another choice of circuits', async () => {
    const seal = json<Seal>('seal.json');
    const other = '11'.repeat(32);
    const secret = await run(zipOf({ ...archive, 'seal.json': encode(canonicalJson({ ...seal, secret: other })) }));
    expect([secret.status, secret.stdout]).toEqual([1, expect.stringMatching(/DIFFERS {2}seal against its commitment: .*The SHA-256 of the secret is/)]);
    const fewer = await run(zipOf({ ...archive, 'seal.json': encode(canonicalJson({ ...seal, sealed: seal.sealed.slice(1) })) }));
    expect([fewer.status, fewer.stdout]).toEqual([1, expect.stringMatching(/DIFFERS {2}seal against its commitment: /)]);
    const none = await run(zipOf(Object.fromEntries(Object.entries(archive).filter(([name]) => name !== 'seal.json'))));
    expect([none.status, none.stdout]).toEqual([1, expect.stringContaining('but there is no seal')]);
  });

  it('a run sheet that commits to another secret', async () => {
    const sheet = { ...json<object>('run-sheet.json'), sealSha256: '22'.repeat(32) };
    const { status, stdout } = await run(zipOf({ ...archive, 'run-sheet.json': encode(canonicalJson(sheet)) }));
    expect(status).toBe(1);
    expect(stdout).toMatch(/DIFFERS {2}content id of the run sheet/);
    expect(stdout).toMatch(/DIFFERS {2}seal against its commitment: .*not the one printed on the sheet/);
  });
});

describe('npm run verify, exit 2 where nothing can be read', () => {
  const refused = async (target: string, sentence: RegExp): Promise<void> => {
    const { status, stdout, stderr } = await run(target);
    expect({ status, stdout }).toEqual({ status: 2, stdout: '' });
    expect(stderr).toMatch(sentence);
    expect(stderr).not.toMatch(/\n\s+at /);
  };

  it('an archive cut short, one of something else, a file that is no archive, none', async () => {
    const whole = await fetched(`/api/v1/entries/${accession}/v/1/archive`);
    const cut = join(folder, 'cut.zip');
    writeFileSync(cut, whole.subarray(0, whole.length / 2));
    await refused(cut, /no zip archive, or is damaged or cut short/);
    await refused(zipOf({ 'letter.txt': encode('Dear reader') }), /holds no entry\.json: it is not the archive of an entry/);
    const text = join(folder, 'text.zip');
    writeFileSync(text, 'not a zip');
    await refused(text, /no zip archive/);
    await refused(join(folder, 'none.zip'), /cannot be read \(ENOENT\)/);
  });

  it('an archive that would grow beyond the limit of a dataset', async () => {
    const bomb = new Uint8Array(65 * 2 ** 20);
    await refused(zipOf({ ...archive, 'dataset.json': bomb }), /dataset\.json in .* is larger than 64 MiB when unpacked/);
  });

  it('an entry that does not exist, an address that names none, a host that does not answer, a registry that is none', async () => {
    await refused(`${base}/entries/EVB-999999`, /There is no public entry at .*EVB-999999/);
    await refused(`${base}/boards/quarter-turn-1q/1`, /names no entry/);
    await refused('http://127.0.0.1:9/entries/EVB-000001', /cannot be reached \(.*\)/);
    const other = createServer((_, response) => response.end('{"hello":1}'));
    await new Promise<void>((done) => other.listen(0, '127.0.0.1', done));
    await refused(`http://127.0.0.1:${(other.address() as AddressInfo).port}/entries/EVB-000001`, /does not answer as a registry does/);
    other.closeAllConnections();
    await new Promise((done) => other.close(done));
  });

  it('no target, or two', async () => {
    for (const args of [[], ['a.zip', 'b.zip']]) expect(await typed(...args)).toMatchObject({ status: 2, stdout: '', stderr: expect.stringMatching(/Name one archive or one address/) as unknown });
  });
});

describe('npm run verify of a withdrawn entry', () => {
  it('checks the hashes that are left, says so, and does not claim the figures', async () => {
    const desk = await makeDesk(app());
    const { accession: gone } = await accepted(app(), desk, makeDataset(desk, null));
    await withdrawn(app(), { accession: gone, version: 1 }, 'The wrong qubit was recorded.');
    expect((await fetch(`${base}/api/v1/entries/${gone}/v/1/archive`)).status).toBe(410);
    const { status, stdout } = await run(`${base}/entries/${gone}`);
    expect(status).toBe(0);
    expect(stdout).toContain(`${gone}.1 was withdrawn: its data is not handed out, so that only hashes and proof could be checked.`);
    expect(stdout).toMatch(/agrees {3}log, leaf against the record: leaf \d+ of \d+/);
    expect(stdout).toMatch(/agrees {3}log, withdrawal, leaf against the record: leaf \d+ of \d+/);
    expect(stdout).not.toContain('Retained signal');
  });
});
