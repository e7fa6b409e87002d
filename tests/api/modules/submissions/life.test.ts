import { createHash } from 'node:crypto';
import { gzipSync } from 'node:zlib';
import { describe, expect, it } from 'vitest';
import { submission as submissionContract } from '#shared/contracts/submissions.ts';
import { runEstimate } from '#api/modules/submissions/run-estimate.ts';
import { bytesOf, makeDataset, makeDesk, makeDrawnSheet, sendFile, workFor } from '#tests/support/record.ts';
import { asStranger } from '#tests/support/sign-in.ts';
import { useTestApp } from '#tests/support/test-app.ts';

const app = useTestApp();
const sha256 = (bytes: Uint8Array): string => createHash('sha256').update(bytes).digest('hex');

describe('the life of a submission over HTTP', () => {
  it('goes from a gzip file to a frozen entry whose bytes, result, replicates and seal are as they were', async () => {
    const desk = await makeDesk(app());
    const sheet = await makeDrawnSheet(app(), desk);
    const bytes = bytesOf(makeDataset(desk, sheet));

    const sent = await sendFile(desk.client, 'post', '/api/v1/submissions', gzipSync(bytes), { 'idempotency-key': 'life-1', 'content-encoding': 'gzip', 'x-file-name': 'meadow%20spring.json.gz' });
    expect(sent.status, JSON.stringify(sent.body)).toBe(202);
    expect(sent.headers.location).toBe(`/api/v1/submissions/${sent.body.id}`);
    expect(sent.body).toMatchObject({ state: 'checking' });
    const id = sent.body.id as string;

    const checking = submissionContract.parse((await desk.client('get', `/api/v1/submissions/${id}`)).body);
    expect(checking).toMatchObject({ state: 'checking', progress: 0, runSheet: sheet.id, round: 1, result: null, replicates: 2000, file: { name: 'meadow spring.json', bytes: bytes.length, bytesSha256: sha256(bytes), circuits: 250 } });

    expect(await runEstimate(await workFor(app(), null), id, 1)).toBe(true);
    const ready = submissionContract.parse((await desk.client('get', `/api/v1/submissions/${id}`)).body);
    expect(ready.checks.filter((c) => c.status === 'failed')).toEqual([]);
    expect(ready).toMatchObject({ state: 'ready', progress: 1, recordComplete: false, replicatesDone: 2000, may: { send: false, edit: true } });
    expect(ready.result?.figures.find((f) => f.key === 'retained-signal' && f.depth === 16)?.value).toBeCloseTo(0.98 * 0.998 ** 16, 1);
    expect(ready.result?.sealedCheck).not.toBeNull();

    expect((await desk.client('post', `/api/v1/submissions/${id}/submit`)).body).toMatchObject({ status: 400, code: 'invalid-request', errors: [{ pointer: '/access' }, { pointer: '/interests' }] });
    expect((await desk.client('patch', `/api/v1/submissions/${id}`).send({ access: 'own device', interests: 'none' })).status).toBe(200);
    expect((await desk.client('post', `/api/v1/submissions/${id}/submit`)).body).toMatchObject({ state: 'in-review' });

    const queue = await desk.curatorClient('get', '/api/v1/reviews');
    expect(queue.body.items.map((i: { id: string }) => i.id)).toContain(id);
    const claimed = await desk.curatorClient('post', `/api/v1/reviews/${id}/claim`);
    expect(claimed.body).toMatchObject({ claimedByMe: true, may: { decide: true } });
    expect(claimed.body.drift).toHaveLength(8);
    const decided = await desk.curatorClient('post', `/api/v1/reviews/${id}/decision`).send({ outcome: 'accept', reason: 'Sound throughout.', noInterest: true });
    expect(decided.body).toEqual({ submission: id, state: 'frozen', entry: { accession: 'EVB-000001', version: 1 } });

    const reader = asStranger(app());
    const entry = await reader('get', '/api/v1/entries/EVB-000001');
    expect(entry.body).toMatchObject({ accession: 'EVB-000001', version: 1, state: 'frozen', eligibility: [], longestCircuit: 16, circuits: { estimated: 200, sealed: 50 } });
    expect(entry.body.sealedPoints).toHaveLength(50);
    const at = '/api/v1/entries/EVB-000001/v/1';
    const dataset = await reader('get', `${at}/dataset`).buffer(true).parse(collect);
    expect(Buffer.compare(dataset.body as Buffer, bytes)).toBe(0);
    expect(dataset.headers).toMatchObject({ 'content-type': 'application/json; charset=utf-8', etag: `"${sha256(bytes)}"`, 'content-disposition': expect.stringContaining('meadow spring.json') as string });
    expect((await reader('get', `${at}/dataset`).set('if-none-match', `"${sha256(bytes)}"`)).status).toBe(304);
    for (const kind of ['result', 'replicates'] as const) {
      const file = await reader('get', `${at}/${kind}`).buffer(true).parse(collect);
      expect(sha256(file.body as Buffer)).toBe(entry.body.provenance[`${kind}Sha256`]);
    }
    const seal = await reader('get', `${at}/seal`);
    expect(seal.body).toMatchObject({ format: 'evenbeam.seal', runSheet: sheet.id, sealSha256: sheet.sheet.sealSha256 });
    expect(seal.body.sealed).toHaveLength(50);
    const done = submissionContract.parse((await desk.client('get', `/api/v1/submissions/${id}`)).body);
    expect(done.history.map((h) => h.state)).toEqual(['draft', 'checking', 'ready', 'in-review', 'accepted', 'frozen']);
    expect(done).toMatchObject({ entry: { accession: 'EVB-000001', version: 1 }, decision: { outcome: 'accepted' }, may: { edit: false, cancel: false } });
  });
});

const collect = (response: unknown, done: (error: Error | null, body: Buffer) => void): void => {
  const stream = response as NodeJS.ReadableStream;
  const parts: Buffer[] = [];
  stream.on('data', (part: Buffer) => parts.push(part));
  stream.on('end', () => done(null, Buffer.concat(parts)));
};
