import { gzipSync } from 'node:zlib';
import { beforeAll, describe, expect, it } from 'vitest';
import type { Dataset } from '#shared/formats/types.ts';
import { bytesOf, makeDataset, makeDesk, sendFile, type Desk } from '#tests/support/record.ts';
import { useTestApp } from '#tests/support/test-app.ts';

const app = useTestApp();
let desk: Desk;
beforeAll(async () => {
  desk = await makeDesk(app());
});

const changed = (change: (dataset: Record<string, never> & Dataset) => void): Buffer => {
  const dataset = makeDataset(desk, null, { seed: 7 }) as Record<string, never> & Dataset;
  change(dataset);
  return bytesOf(dataset);
};
const circuit = (dataset: Dataset) => dataset.patches[0]!.circuits[0]!;
const text = (more: string): Buffer => Buffer.from(bytesOf(makeDataset(desk, null, { seed: 7 })).toString().replace(/\}\s*$/, `${more}}`));

/** What is broken, the bytes, the status, and where the first fault is told. */
const broken: [name: string, make: () => Buffer, status: number, pointer: string, more?: Record<string, string>][] = [
  ['an empty body', () => Buffer.alloc(0), 400, ''],
  ['no JSON at all', () => Buffer.from('counts: 31, 969'), 400, ''],
  ['JSON that breaks off', () => bytesOf(makeDataset(desk, null, { seed: 7 })).subarray(0, 900), 400, ''],
  ['bytes that are not UTF-8', () => Buffer.concat([Buffer.from('{"format":"'), Buffer.from([0xff, 0xfe]), Buffer.from('"}')]), 400, ''],
  ['a key named twice', () => text(',"title":"again"'), 400, '/title'],
  ['a number beyond double precision', () => text(',"extra":{"x":1e400}'), 400, '/extra/x'],
  ['nesting beyond 32', () => text(`,"extra":{"x":${'['.repeat(40)}${']'.repeat(40)}}`), 400, '/extra/x'],
  ['an array in place of the object', () => Buffer.from('[]'), 422, ''],
  ['another format', () => changed((d) => Object.assign(d, { format: 'something.else' })), 422, '/format'],
  ['a version that is not known', () => changed((d) => Object.assign(d, { formatVersion: '9.0.0' })), 422, '/formatVersion'],
  ['a property that the format does not have', () => changed((d) => Object.assign(d, { colour: 'red' })), 422, '/colour'],
  ['a missing property', () => changed((d) => delete (d as Partial<Dataset>).licence), 422, ''],
  ['a licence that does not exist', () => changed((d) => Object.assign(d, { licence: 'CC-BY' })), 422, '/licence'],
  ['counts that do not sum to shots', () => changed((d) => (circuit(d).counts['0'] = 1e6)), 422, '/patches/0/circuits/0/counts'],
  ['a negative count', () => changed((d) => (circuit(d).counts['0'] = -1)), 422, '/patches/0/circuits/0/counts/0'],
  ['an outcome of the wrong length', () => changed((d) => (circuit(d).counts = { '01': circuit(d).shots })), 422, '/patches/0/circuits/0/counts/01'],
  ['a gate that is not declared', () => changed((d) => (circuit(d).gates = ['zz'])), 422, '/patches/0/circuits/0/gates/0'],
  ['a circuit id used twice', () => changed((d) => (circuit(d).id = d.patches[0]!.circuits[1]!.id)), 422, '/patches/0/circuits/1/id'],
  ['a gate set that is not the class’s', () => changed((d) => Object.assign(d.gates[1]!, { ideal: { gate: 'rx', params: [1] } })), 422, '/gates/1'],
  ['a matrix that is not unitary', () => changed((d) => Object.assign(d, { gateClass: 'custom' }, Object.assign(d.gates[1]!, { ideal: { unitary: [[[1, 0], [0, 0]], [[0, 0], [2, 0]]] } }) && {})), 422, '/gates/1/ideal'],
  ['a register of the wrong size', () => changed((d) => (d.register = ['q3', 'q4'])), 422, '/'],
  ['an ORCID iD with a wrong check digit', () => changed((d) => (d.contributors[0]!.orcid = '0000-0002-1825-0098')), 422, '/contributors/0/orcid'],
  ['a run that ends before it starts', () => changed((d) => (d.acquisition.endedAt = '2020-01-01T00:00:00Z')), 422, '/acquisition'],
  ['gzip that is cut short', () => gzipSync(bytesOf(makeDataset(desk, null, { seed: 7 }))).subarray(0, 500), 400, '', { 'content-encoding': 'gzip' }],
  ['gzip without its header', () => gzipSync(bytesOf(makeDataset(desk, null, { seed: 7 }))), 400, ''],
  ['text announced as gzip', () => Buffer.from('{}'), 400, '', { 'content-encoding': 'gzip' }],
  ['a small file that unpacks beyond 64 MiB', () => gzipSync(Buffer.alloc(65 * 1024 * 1024, 32)), 413, '', { 'content-encoding': 'gzip' }],
  ['an encoding that is not taken', () => Buffer.from('{}'), 415, '', { 'content-encoding': 'br' }],
  ['a kind of content that is not taken', () => Buffer.from('a,b'), 415, '', { 'content-type': 'text/csv' }],
];

const stored = async (): Promise<unknown> => (await app().deps.pool.query('select (select count(*) from submission) s, (select count(*) from submission_file) f, (select count(*) from idempotency_key) k, (select count(*) from pgboss.job) j, (select count(*) from mail_outbox) m')).rows;

describe('a broken file', () => {
  it.each(broken)('%s is refused with its place, and nothing is stored', async (_name, make, status, pointer, more = {}) => {
    const before = await stored();
    const answer = await sendFile(desk.client, 'post', '/api/v1/submissions', make(), { 'idempotency-key': 'k', ...more });
    expect(answer.status, JSON.stringify(answer.body)).toBe(status);
    expect(answer.headers['content-type']).toContain('application/problem+json');
    const body = answer.body as { detail: string; errors?: { pointer: string; message: string }[] };
    expect(body.detail.length).toBeGreaterThan(10);
    if (pointer !== '') expect(body.errors?.map((e) => e.pointer).some((p) => p.startsWith(pointer)), JSON.stringify(body)).toBe(true);
    expect(body.errors?.length ?? 0).toBeLessThanOrEqual(50);
    expect(await stored()).toEqual(before);
  });

  it('is refused without an Idempotency-Key before it is read', async () => {
    const answer = await sendFile(desk.client, 'post', '/api/v1/submissions', bytesOf(makeDataset(desk, null)));
    expect(answer.body).toMatchObject({ status: 400, code: 'missing-idempotency-key' });
  });
});
