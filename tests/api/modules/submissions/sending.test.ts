import { createHash } from 'node:crypto';
import { gzipSync } from 'node:zlib';
import { beforeAll, describe, expect, it } from 'vitest';
import { bytesOf, makeDataset, makeDesk, makeDrawnSheet, sendFile, workFor, type Desk } from '#tests/support/record.ts';
import { addMember, makeOrganisation, makeToken, makeUser } from '#tests/support/people.ts';
import { asStranger, signInAs, withToken } from '#tests/support/sign-in.ts';
import { useTestApp } from '#tests/support/test-app.ts';
import { accepted, estimated, receive, stateOf } from '#tests/support/life.ts';
import { runEstimate } from '#api/modules/submissions/run-estimate.ts';
import { cancelSubmission } from '#api/modules/submissions/service.ts';

const app = useTestApp();
let desk: Desk;
let other: Desk;
beforeAll(async () => {
  desk = await makeDesk(app());
  other = await makeDesk(app());
});
const address = '/api/v1/submissions';

describe('sending a dataset', () => {
  it('gives the same answer to the same key and content, and makes one submission', async () => {
    const bytes = bytesOf(makeDataset(desk, null));
    const first = await sendFile(desk.client, 'post', address, bytes, { 'idempotency-key': 'once' });
    const again = await sendFile(desk.client, 'post', address, bytes, { 'idempotency-key': 'once' });
    expect([first.status, again.status]).toEqual([202, 202]);
    expect(again.body).toEqual(first.body);
    expect(again.headers).toMatchObject({ location: first.headers.location as string, 'idempotency-replayed': 'true' });
  });

  it('refuses a key that was used for another body', async () => {
    await sendFile(desk.client, 'post', address, bytesOf(makeDataset(desk, null)), { 'idempotency-key': 'twice' });
    const answer = await sendFile(desk.client, 'post', address, bytesOf(makeDataset(desk, null)), { 'idempotency-key': 'twice' });
    expect(answer.body).toMatchObject({ status: 422, code: 'idempotency-mismatch' });
  });

  it('gives two requests at the same instant one submission and one answer', async () => {
    const bytes = bytesOf(makeDataset(desk, null));
    const answers = await Promise.all([1, 2, 3].map(() => sendFile(desk.client, 'post', address, bytes, { 'idempotency-key': 'race' })));
    expect(answers.map((a) => a.status)).toEqual([202, 202, 202]);
    expect(new Set(answers.map((a) => (a.body as { id: string }).id)).size).toBe(1);
  });

  it('lets two organisations use the same key', async () => {
    const mine = await sendFile(desk.client, 'post', address, bytesOf(makeDataset(desk, null)), { 'idempotency-key': 'shared' });
    const theirs = await sendFile(other.client, 'post', address, bytesOf(makeDataset(other, null)), { 'idempotency-key': 'shared' });
    expect([mine.status, theirs.status]).toEqual([202, 202]);
  });

  it('answers 409 for content that is live, however it is spelled, and names it only to its own organisation', async () => {
    const dataset = makeDataset(desk, null);
    const id = await receive(app(), desk, dataset);
    const mine = await sendFile(desk.client, 'post', address, Buffer.from(JSON.stringify(dataset)), { 'idempotency-key': 'same-1' });
    expect(mine.body).toMatchObject({ status: 409, code: 'duplicate-content' });
    expect((mine.body as { detail: string }).detail).toContain(id);
    const theirs = await sendFile(other.client, 'post', address, bytesOf(dataset), { 'idempotency-key': 'same-2' });
    expect(theirs.body).toMatchObject({ status: 409, code: 'duplicate-content' });
    expect((theirs.body as { detail: string }).detail).not.toMatch(/S-\d/);
    await cancelSubmission(await workFor(app(), desk.contributor), id);
    const later = await sendFile(desk.client, 'post', address, bytesOf(dataset), { 'idempotency-key': 'same-3' });
    expect(later.status).toBe(202);
  });

  it('answers 409 for a second dataset of one run sheet until the first is cancelled', async () => {
    const sheet = await makeDrawnSheet(app(), desk);
    const id = await receive(app(), desk, makeDataset(desk, sheet));
    const second = await sendFile(desk.client, 'post', address, bytesOf(makeDataset(desk, sheet)), { 'idempotency-key': 'sheet-1' });
    expect(second.body).toMatchObject({ status: 409, code: 'already-exists' });
    expect((await desk.client('get', `/api/v1/run-sheets/${sheet.id}`)).body).toMatchObject({ submission: id });
    await cancelSubmission(await workFor(app(), desk.contributor), id);
    expect((await sendFile(desk.client, 'post', address, bytesOf(makeDataset(desk, sheet)), { 'idempotency-key': 'sheet-2' })).status).toBe(202);
  });

  it('keeps a run sheet used once its sealed circuits were read, also by a correction of another entry', async () => {
    const sheet = await makeDrawnSheet(app(), desk);
    const id = await estimated(app(), desk, makeDataset(desk, sheet));
    const refused = { status: 409, code: 'already-exists', detail: `${id} holds the dataset of run sheet ${sheet.id}. A sheet counts once: draw a new sheet.` };
    await cancelSubmission(await workFor(app(), desk.contributor), id);
    const again = (key: string, query = '') => sendFile(desk.client, 'post', `${address}${query}`, bytesOf(makeDataset(desk, sheet)), { 'idempotency-key': key });
    expect((await again('read-1')).body).toMatchObject(refused);
    const entry = await accepted(app(), desk, makeDataset(desk, await makeDrawnSheet(app(), desk)));
    expect((await again('read-2', `?correctionOf=${entry.accession}`)).body).toMatchObject(refused);
  });

  it('refuses the character U+0000 in an address, a query, a cursor and a body, and names the place', async () => {
    const nul = (place: string) => ({ status: 400, code: 'invalid-request', detail: expect.stringContaining(`${place}the character U+0000`) as string });
    expect((await desk.client('get', '/api/v1/entries?q=a%00b')).body).toMatchObject(nul('In the query, q: '));
    expect((await desk.client('get', '/api/v1/devices/%00')).body).toMatchObject(nul('In the address, id: '));
    expect((await desk.client('get', `/api/v1/devices?cursor=${Buffer.from('["\\u0000"]').toString('base64url')}`)).body).toMatchObject({ status: 400, code: 'invalid-request' });
    const id = await receive(app(), desk, makeDataset(desk, null));
    expect((await desk.client('post', `${address}/${id}/messages`).send({ body: 'a\u0000b' })).body).toMatchObject({ ...nul('/body: '), errors: [{ pointer: '/body' }] });
  });

  it('keeps a file of several MiB, which goes to the database in pieces, byte for byte, also as a replacement', async () => {
    const big = (letter: string): Buffer => bytesOf(makeDataset(desk, null, { device: { provider: desk.organisation.name, name: 'Nowhere-1', modality: 'spin' }, extra: { log: letter.repeat(3_400_000) } }));
    const [first, second] = [big('a'), big('b')];
    const sent = await sendFile(desk.client, 'post', address, gzipSync(first), { 'idempotency-key': 'big', 'content-encoding': 'gzip' });
    expect(sent.status, JSON.stringify(sent.body)).toBe(202);
    const { id } = sent.body as { id: string };
    await runEstimate(await workFor(app(), null), id, 1);
    expect((await sendFile(desk.client, 'put', `${address}/${id}/dataset`, second)).status).toBe(202);
    const { rows } = await app().deps.pool.query<{ bytes: Buffer; size: number; bytes_sha256: string }>('select bytes, size, bytes_sha256 from submission_file where submission_id = $1 order by round', [id]);
    expect(rows.map((r, i) => [Buffer.compare(r.bytes, i === 0 ? first : second), createHash('sha256').update(r.bytes).digest('hex') === r.bytes_sha256])).toEqual([[0, true], [0, true]]);
    const read = await desk.client('get', `${address}/${id}/dataset`).buffer(true);
    expect(read.text).toBe(second.toString());
  });

  it('takes an API token of the organisation and writes down for whom it acted', async () => {
    const em = app().deps.orm.em.fork();
    const script = withToken(app(), await makeToken(em, desk.organisation, desk.contributor));
    const answer = await sendFile(script, 'post', address, bytesOf(makeDataset(desk, null)), { 'idempotency-key': 'token' });
    expect(answer.status).toBe(202);
    const seen = await script('get', `${address}/${(answer.body as { id: string }).id}`);
    expect(seen.body).toMatchObject({ organisation: { id: desk.organisation.id }, history: [{ state: 'draft', by: `${desk.contributor.name}, by API token “script”` }, { state: 'checking', by: null }] });
  });

  it('asks for the organisation where the caller contributes to two', async () => {
    const em = app().deps.orm.em.fork();
    const user = await makeUser(em);
    const [a, b] = [await makeOrganisation(em), await makeOrganisation(em)];
    await addMember(em, user, a);
    await addMember(em, user, b);
    const client = await signInAs(app(), user);
    const bytes = bytesOf(makeDataset({ ...desk, organisation: a }, null));
    expect((await sendFile(client, 'post', address, bytes, { 'idempotency-key': 'o1' })).body).toMatchObject({ status: 400, code: 'invalid-request' });
    expect((await sendFile(client, 'post', `${address}?organisation=${a.id}`, bytes, { 'idempotency-key': 'o2' })).status).toBe(202);
    expect((await sendFile(client, 'post', `${address}?organisation=${desk.organisation.id}`, bytes, { 'idempotency-key': 'o3' })).body).toMatchObject({ status: 403 });
  });

  it('is closed to strangers, to other organisations and to curators', async () => {
    const bytes = bytesOf(makeDataset(desk, null));
    const id = await receive(app(), desk, makeDataset(desk, null));
    expect((await sendFile(asStranger(app()), 'post', address, bytes, { 'idempotency-key': 'x' })).status).toBe(401);
    expect((await sendFile(desk.curatorClient, 'post', address, bytes, { 'idempotency-key': 'x' })).status).toBe(403);
    for (const [method, path, body] of [['get', ''], ['get', '/dataset'], ['patch', '', { notes: 'x' }], ['post', '/submit'], ['post', '/cancel'], ['post', '/messages', { body: 'x' }]] as const) {
      const request = other.client(method, `${address}/${id}${path}`);
      expect((await (body ? request.send(body) : request)).status, `${method} ${path}`).toBe(403);
    }
    expect(await stateOf(app(), id)).toBe('checking');
  });

  it('refuses a correction of an entry of another device, register or organisation', async () => {
    const { accession } = await accepted(app(), desk, makeDataset(desk, await makeDrawnSheet(app(), desk)));
    const strange = bytesOf(makeDataset(desk, null, { register: ['q9'] }));
    const wrong = await sendFile(desk.client, 'post', `${address}?correctionOf=${accession}`, strange, { 'idempotency-key': 'c1' });
    expect((wrong.body as { detail: string }).detail).toContain('the register is q9, not q3');
    const foreign = await sendFile(other.client, 'post', `${address}?correctionOf=${accession}`, bytesOf(makeDataset(other, null)), { 'idempotency-key': 'c2' });
    expect(foreign.body).toMatchObject({ status: 400, code: 'invalid-request' });
  });
});
