import { createHash, createPublicKey, verify } from 'node:crypto';
import { beforeAll, describe, expect, it } from 'vitest';
import { logHead, logLeafList, logProof, type LogHead, type LogProof } from '#shared/contracts/log.ts';
import { canonicalJsonByLibrary } from '#shared/formats/canonical-json.ts';
import { includes, isConsistent } from '#shared/merkle/check.ts';
import { liftEmbargoes } from '#api/modules/entries/freeze.ts';
import { decide } from '#api/modules/reviews/service.ts';
import { runSql } from '#api/lib/run-sql.ts';
import { MTH } from '#tests/shared/merkle/slow-tree.ts';
import { makeDataset, makeDesk, workFor, type Desk } from '#tests/support/record.ts';
import { accepted, inReview, withdrawn } from '#tests/support/life.ts';
import { asStranger, type Client } from '#tests/support/sign-in.ts';
import { testStart, useTestApp } from '#tests/support/test-app.ts';

const app = useTestApp();
let desk: Desk;
let reader: Client;
const names: { accession: string; version: number }[] = [];

const bytesOf = (text: string): Uint8Array => new Uint8Array(Buffer.from(text, 'hex'));
const get = async (path: string): Promise<unknown> => {
  const response = await reader('get', path);
  expect(response.status, `${path}: ${JSON.stringify(response.body)}`).toBe(200);
  return response.body as unknown;
};
const head = async (query = ''): Promise<LogHead> => logHead.parse(await get(`/api/v1/log/head${query}`));
const proofOf = async (name: { accession: string; version: number }, query = ''): Promise<LogProof> => logProof.parse(await get(`/api/v1/entries/${name.accession}/v/${name.version}/proof${query}`));
const leaves = async () => logLeafList.parse(await get('/api/v1/log/leaves?limit=200')).items;
const leafHashOf = (leaf: unknown): Buffer => createHash('sha256').update(Buffer.from([0])).update(canonicalJsonByLibrary(leaf)).digest();

beforeAll(async () => {
  desk = await makeDesk(app());
  reader = asStranger(app());
  expect((await reader('get', '/api/v1/log/head')).status).toBe(404);
  for (let i = 0; i < 5; i += 1) names.push(await accepted(app(), desk, makeDataset(desk, null)));
  names.push(await accepted(app(), desk, makeDataset(desk, null), { correctionOf: names[0]!.accession }));
});

describe('the log', () => {
  it('has one leaf for each freezing and each new version, in their order, holding the digests of the entry', async () => {
    const items = await leaves();
    expect(items.map(({ leaf }) => [leaf.event, leaf.accession, leaf.version])).toEqual(names.map((n) => ['frozen', n.accession, n.version]));
    const entry = (await get(`/api/v1/entries/${names[2]!.accession}`)) as { provenance: Record<string, string>; method: string; frozenAt: string };
    const { contentId, bytesSha256, resultSha256, replicatesSha256 } = entry.provenance;
    expect(items[2]!.leaf).toEqual({ event: 'frozen', accession: names[2]!.accession, version: 1, contentId, bytesSha256, resultSha256, replicatesSha256, method: entry.method, at: entry.frozenAt });
    for (const { hash, leaf } of items) expect(leafHashOf(leaf).toString('hex')).toBe(hash);
  });

  it('has at every size the root of RFC 9162 over the leaves that it publishes, signed with Ed25519 over the RFC 8785 bytes of the head', async () => {
    const data = (await leaves()).map(({ leaf }) => new TextEncoder().encode(canonicalJsonByLibrary(leaf)));
    for (let n = 1; n <= data.length; n++) {
      const { signature, keyId, publicKey, ...signed } = await head(`?size=${n}`);
      expect(signed).toMatchObject({ treeSize: n, rootHash: Buffer.from(MTH(data.slice(0, n))).toString('hex') });
      const key = Buffer.from(publicKey, 'base64');
      expect(createHash('sha256').update(key).digest('hex')).toBe(keyId);
      const asKey = createPublicKey({ key, format: 'der', type: 'spki' });
      expect(verify(null, Buffer.from(canonicalJsonByLibrary(signed)), asKey, Buffer.from(signature, 'base64'))).toBe(true);
      expect(verify(null, Buffer.from(canonicalJsonByLibrary({ ...signed, treeSize: n + 1 })), asKey, Buffer.from(signature, 'base64'))).toBe(false);
    }
  });

  it('proves every version against the newest head, and every earlier head consistent with it', async () => {
    const newest = await head();
    for (const [i, name] of names.entries()) {
      const proof = await proofOf(name);
      expect(proof).toMatchObject({ leafIndex: i, treeSize: newest.treeSize, rootHash: newest.rootHash, head: newest });
      expect(includes(new Uint8Array(leafHashOf(proof.leaf)), i, proof.treeSize, proof.path.map(bytesOf), bytesOf(proof.rootHash))).toBe(true);
    }
    for (let first = 1; first <= newest.treeSize; first++) {
      const { path } = (await get(`/api/v1/log/consistency?first=${first}&second=${newest.treeSize}`)) as { path: string[] };
      expect(isConsistent(first, newest.treeSize, bytesOf((await head(`?size=${first}`)).rootHash), bytesOf(newest.rootHash), path.map(bytesOf)), `${first}`).toBe(true);
    }
  });

  it('counts its growth by month, ending at its size', async () => {
    const { months } = (await get('/api/v1/log/growth')) as { months: unknown[] };
    expect(months).toEqual([{ month: '2026-05', leaves: names.length, size: names.length }]);
  });

  it('refuses sizes that it never had, with the value, and leaves that are not there', async () => {
    const { treeSize } = await head();
    for (const [query, told] of [[`first=3&second=${treeSize + 1}`, String(treeSize + 1)], ['first=4&second=2', '4 is more than second, 2'], ['first=0&second=2', 'first']] as const) {
      const response = await reader('get', `/api/v1/log/consistency?${query}`);
      expect(response.status, query).toBe(400);
      expect(JSON.stringify(response.body), query).toContain(told);
    }
    expect((await reader('get', `/api/v1/log/head?size=${treeSize + 1}`)).status).toBe(404);
    expect((await reader('get', '/api/v1/entries/EVB-999999/v/1/proof')).status).toBe(404);
    expect((await reader('get', `/api/v1/entries/${names[0]!.accession}/v/1/proof?event=withdrawn`)).status).toBe(404);
  });

  it('gives its leaves over pages of any size from either end', async () => {
    for (const order of ['oldest', 'newest']) {
      const seen: number[] = [];
      let cursor: string | null = '';
      while (cursor !== null) {
        const page = logLeafList.parse(await get(`/api/v1/log/leaves?order=${order}&limit=2${cursor === '' ? '' : `&cursor=${cursor}`}`));
        seen.push(...page.items.map((i) => i.index));
        cursor = page.nextCursor;
      }
      const all = names.map((_, i) => i);
      expect(seen).toEqual(order === 'oldest' ? all : all.reverse());
    }
  });
});

describe('a leaf', () => {
  it('is not written for what is under embargo, and is on the day it becomes public', async () => {
    const before = (await head()).treeSize;
    const { accession } = await accepted(app(), desk, makeDataset(desk, null), { embargoUntil: '2026-05-20' });
    expect((await head()).treeSize).toBe(before);
    expect((await reader('get', `/api/v1/entries/${accession}/v/1/proof`)).status).toBe(404);
    app().clock.set(new Date('2026-05-20T00:07:00Z'));
    await liftEmbargoes(await workFor(app(), null));
    expect((await proofOf({ accession, version: 1 })).leaf.at).toBe('2026-05-20T00:07:00.000Z');
    app().clock.set(testStart);
  });

  it('is written for a withdrawal; both proofs stay', async () => {
    const name = await accepted(app(), desk, makeDataset(desk, null));
    await withdrawn(app(), name, 'the wrong qubit was recorded');
    const [frozen, gone] = [await proofOf(name), await proofOf(name, '?event=withdrawn')];
    expect([frozen.leaf.event, gone.leaf.event, gone.leafIndex - frozen.leafIndex]).toEqual(['frozen', 'withdrawn', 1]);
  });

  it('leaves no gap when a freezing is rolled back, nor when several come at once', async () => {
    const before = (await head()).treeSize;
    const work = await workFor(app(), desk.curator);
    const id = await inReview(app(), desk, makeDataset(desk, null));
    await expect(work.em.fork().transactional(async (em) => {
      await decide({ ...work, em }, id, { outcome: 'accept', reason: 'Sound.', noInterest: true });
      throw new Error('the power went');
    })).rejects.toThrow('the power went');
    expect((await head()).treeSize).toBe(before);
    const ids = [id];
    for (let i = 0; i < 3; i += 1) ids.push(await inReview(app(), desk, makeDataset(desk, null)));
    await Promise.all(ids.map(async (one) => decide(await workFor(app(), desk.curator), one, { outcome: 'accept', reason: 'Sound.', noInterest: true })));
    expect((await leaves()).map((l) => l.index)).toEqual(Array.from({ length: before + 4 }, (_, i) => i));
  });

  it('cannot be left out: the database refuses a public state without one', async () => {
    const { accession } = await accepted(app(), desk, makeDataset(desk, null));
    const em = app().deps.orm.em.fork();
    await expect(runSql(em, `insert into entry_state (accession, version, state, at, reason) values ($1, 1, 'withdrawn', now(), 'by hand')`, [accession])).rejects.toMatchObject({ code: 'EB003' });
  });
});
