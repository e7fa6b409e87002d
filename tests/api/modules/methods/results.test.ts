import { createHash } from 'node:crypto';
import pg from 'pg';
import { beforeAll, describe, expect, inject, it } from 'vitest';
import { adminRole } from '#api/cli/postgres/cluster.ts';
import { addressOf } from '#api/cli/postgres/roles.ts';
import { testPasswords } from '#api/cli/postgres/test-cluster.ts';
import { runItem } from '#api/modules/campaigns/run-item.ts';
import { startCampaign } from '#api/modules/campaigns/service.ts';
import { readSheetSeal } from '#api/modules/run-sheets/sheet-store.ts';
import { checkAdded } from '#api/modules/scrub/check-added.ts';
import { versionResults } from '#shared/contracts/methods.ts';
import { gateClassById } from '#shared/domain/gate-classes.ts';
import { canonicalJson, contentIdOf } from '#shared/formats/canonical-json.ts';
import { estimate } from '#shared/method/estimate.ts';
import { clearContributorsJobs, makeEntries, makeStewardClient, viewOf, withdraw } from '#tests/support/campaigns.ts';
import { accepted, fewReplicates } from '#tests/support/life.ts';
import { makeSteward } from '#tests/support/people.ts';
import { makeDataset, makeDesk, makeDrawnSheet, workFor, type Desk } from '#tests/support/record.ts';
import { asStranger, type Client } from '#tests/support/sign-in.ts';
import { useTestApp } from '#tests/support/test-app.ts';

const app = useTestApp();
let desk: Desk;
let reader: Client;
let accession: string;
let other: string;
let expected: ReturnType<typeof estimate>;
const api = (rest = ''): string => `/api/v1/entries/${accession}/v/1/results${rest}`;
const bytesAt = async (path: string): Promise<Buffer> => (await reader('get', path).buffer(true).parse((response, done) => {
  const parts: Buffer[] = [];
  response.on('data', (part: Buffer) => parts.push(Buffer.from(part)));
  response.on('end', () => done(null, Buffer.concat(parts)));
})).body as Buffer;
const digest = (bytes: Buffer): string => createHash('sha256').update(bytes).digest('hex');
const as = async (url: string, sql: string): Promise<unknown[]> => {
  const client = new pg.Client({ connectionString: url });
  await client.connect();
  return client.query(sql).then(({ rows }) => rows as unknown[]).finally(() => client.end());
};

beforeAll(async () => {
  desk = await makeDesk(app());
  reader = asStranger(app());
  const sheet = await makeDrawnSheet(app(), desk);
  const dataset = makeDataset(desk, sheet);
  ({ accession } = await accepted(app(), desk, dataset));
  expected = estimate({ dataset, contentId: contentIdOf(dataset), gateClass: gateClassById('quarter-turn-1q/1'), seal: await readSheetSeal(app().deps.orm.em.fork(), sheet.id), replicates: fewReplicates, method: 'M2' });
  await clearContributorsJobs(app());
  const id = await startCampaign(await workFor(app(), await makeSteward(app().deps.orm.em.fork())), 'M2');
  const { rows } = await app().deps.pool.query<{ entryVersion: string; jobId: string }>('select entry_version_id as "entryVersion", job_id as "jobId" from campaign_item where campaign_id = $1', [id]);
  await runItem(await workFor(app(), null), { campaign: id, ...rows[0]! });
  // A second run of the same job, as after a crash, changes nothing.
  await runItem(await workFor(app(), null), { campaign: id, ...rows[0]! });
  expect(await viewOf(app(), id)).toMatchObject({ counts: { done: 1 } });
  [other] = (await makeEntries(app(), desk, 1)) as [string];
}, 240_000);

describe('results beside the frozen one', () => {
  it('are, to the byte, what the method gives for the stored dataset and its revealed seal', async () => {
    expect((await bytesAt(api('/M2'))).toString('utf8')).toBe(canonicalJson(expected.result));
    expect(Buffer.compare(await bytesAt(api('/M2/replicates')), Buffer.from(expected.replicates.values.buffer))).toBe(0);
  });

  it('are listed with their digests, the frozen one first, which stays what it was', async () => {
    const { items } = versionResults.parse((await reader('get', api())).body);
    expect(items.map((r) => [r.method, r.status, r.frozen, r.replicates])).toEqual([['M1', 'official', true, fewReplicates], ['M2', 'draft', false, fewReplicates]]);
    for (const { links, resultSha256, replicatesSha256 } of items) {
      expect(digest(await bytesAt(links.result))).toBe(resultSha256);
      expect(digest(await bytesAt(links.replicates!))).toBe(replicatesSha256);
    }
    const frozen = (await reader('get', `/api/v1/entries/${accession}/v/1`)).body;
    expect(frozen.method).toBe('M1');
    expect(items[0]).toMatchObject({ resultSha256: frozen.provenance.resultSha256, headline: frozen.headline });
    expect(await bytesAt(api('/M1'))).toEqual(await bytesAt(`/api/v1/entries/${accession}/v/1/result`));
  });

  it('answer 304 to their own tag, 404 where there is none, and 400 to what is no method version', async () => {
    const { etag } = (await reader('get', api('/M2'))).headers;
    expect((await reader('get', api('/M2')).set('if-none-match', etag!)).status).toBe(304);
    expect((await reader('get', `/api/v1/entries/${other}/v/1/results/M2`)).body).toMatchObject({ status: 404, detail: expect.stringContaining('"M2"') as string });
    expect((await reader('get', api('/M2-draft'))).status).toBe(400);
  });

  it('are counted by method version, official ones apart from drafts; health names the official ones only', async () => {
    const { items } = (await reader('get', '/api/v1/methods')).body;
    expect(items.map((m: { id: string; status: string; passes: number; results: number }) => [m.id, m.status, m.passes, m.results])).toEqual([['M1', 'official', 8, 2], ['M2', 'draft', 16, 1]]);
    expect((await reader('get', '/api/health')).body.methods).toEqual(['M1']);
  });

  it('cannot be changed, removed or emptied, by the application or by the owner', async () => {
    for (const sql of ["update entry_result set method = 'M3'", 'delete from entry_result', 'truncate entry_result']) {
      await expect(as(app().database.ownerUrl, sql)).rejects.toMatchObject({ code: 'EB001' });
      await expect(as(app().database.url, sql)).rejects.toMatchObject({ code: '42501' });
    }
    for (const sql of ["update campaign set method = 'M3'", 'delete from campaign', "update campaign_item set place = 7", 'delete from campaign_item']) await expect(as(app().database.url, sql)).rejects.toMatchObject({ code: 'EB001' });
  });

  it('are refused by the database under the frozen version’s own method, and for an entry that is not public', async () => {
    const add = (name: string, method: string): string => `insert into entry_result select v.id, '${method}', c.id, '\\x7b7d', repeat('a', 64), '\\x00', repeat('b', 64), 1, '{}', now() from entry_version v, campaign c where v.accession = '${name}' limit 1`;
    const { accession: kept } = await accepted(app(), desk, makeDataset(desk, await makeDrawnSheet(app(), desk)), { embargoUntil: '2026-07-01' });
    await expect(as(app().database.url, add(accession, 'M1'))).rejects.toMatchObject({ code: 'EB003' });
    await expect(as(app().database.ownerUrl, add(kept, 'M2'))).rejects.toMatchObject({ code: 'EB003' });
    expect((await reader('get', `/api/v1/entries/${kept}/v/1/results`)).status).toBe(404);
  });
});

describe('a board by method version', () => {
  const board = async (query = '') => (await reader('get', `/api/v1/boards/quarter-turn-1q/1${query}`)).body;

  it('offers the versions that its entries have results by, and opens with the official one', async () => {
    expect(await board()).toMatchObject({ method: 'M1', methods: [{ id: 'M1', status: 'official', results: 2 }, { id: 'M2', status: 'draft', results: 1 }] });
  });

  it('reads the figures of that version, names what has none, and ranks nothing by a draft', async () => {
    const { method, rows, notListed } = await board('?method=M2');
    expect(method).toBe('M2');
    const all = [...rows.map((row: object) => ({ row, reasons: [] })), ...notListed] as { row: { accession: string; method: string; rank?: unknown; figure: { value: number | null; reason: string | null } }; reasons: { code: string }[] }[];
    const own = all.find(({ row }) => row.accession === accession)!;
    const value = expected.result.figures.find((f) => f.key === 'retained-signal' && f.depth === 16)!.value;
    expect(own.row).toMatchObject({ method: 'M2', figure: { value } });
    expect(own.row.rank ?? null).toBeNull();
    const without = all.find(({ row }) => row.accession === other)!;
    expect(without).toMatchObject({ row: { figure: { value: null, reason: 'not estimated with M2' } }, reasons: [{ code: 'no-result' }] });
  });

  it('refuses a version that this registry does not have', async () => {
    expect(await board('?method=M9')).toMatchObject({ status: 400, detail: expect.stringContaining('"M9"') as string });
  });
});

describe('the scrub', () => {
  const findings = async () => (await checkAdded({ em: app().deps.orm.em.fork(), trustedKeys: [] })).findings;
  /** As a superuser who puts the triggers out of action. */
  const tamper = async (set: string): Promise<void> => {
    const address = addressOf(adminRole, testPasswords.admin, inject('postgresPort'), app().database.name);
    await as(address, 'alter table entry_result disable trigger all');
    await as(address, `update entry_result set ${set}`);
  };
  const flip = 'set_byte(COLUMN, 20, get_byte(COLUMN, 20) # 1)';

  it.each([
    ['a byte of the result', `result = ${flip.replaceAll('COLUMN', 'result')}`, null, /^Its result has the SHA-256/],
    ['a byte of the replicates', `replicates = ${flip.replaceAll('COLUMN', 'replicates')}`, null, /^Its replicates have the SHA-256/],
    ['the figures that pages show', `summary = jsonb_set(summary, '{figures,0,value}', '2')`, `summary = jsonb_set(summary, '{figures,0,value}', to_jsonb((convert_from(result, 'UTF8')::jsonb #> '{figures,0,value}')))`, /^The figures that pages show/],
  ])('finds that %s was changed past the triggers', async (_what, change, back, sentence) => {
    expect(await findings()).toEqual([]);
    await tamper(change);
    expect(await findings()).toMatchObject([{ where: `${accession}.1 by M2`, sentence: expect.stringMatching(sentence) as string }]);
    await tamper(back ?? change);
    expect(await findings()).toEqual([]);
  });
});

describe('a withdrawn entry', () => {
  it('keeps its results on record and hands out no replicates', async () => {
    await withdraw(app(), accession);
    const { items } = (await reader('get', api())).body;
    expect(items.map((r: { method: string; links: { replicates: string | null } }) => [r.method, r.links.replicates])).toEqual([['M1', null], ['M2', null]]);
    expect((await reader('get', api('/M2/replicates'))).body).toMatchObject({ status: 410, code: 'withdrawn' });
    expect((await reader('get', api('/M2'))).status).toBe(200);
  });
});

describe('the addresses of campaigns', () => {
  it('are closed to contributors and curators', async () => {
    for (const client of [desk.client, desk.curatorClient]) expect((await client('post', '/api/v1/campaigns').send({ method: 'M2' })).status).toBe(403);
    expect((await (await makeStewardClient(app()))('get', '/api/v1/campaigns')).status).toBe(200);
  });
});
