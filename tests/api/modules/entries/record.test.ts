import pg from 'pg';
import { beforeAll, describe, expect, it } from 'vitest';
import { liftEmbargoes } from '#api/modules/entries/freeze.ts';
import { decide } from '#api/modules/reviews/service.ts';
import { runSql } from '#api/lib/run-sql.ts';
import { bytesOf, makeDataset, makeDesk, makeDrawnSheet, workFor, type Desk } from '#tests/support/record.ts';
import { accepted, inReview, stateOf, withdrawn } from '#tests/support/life.ts';
import { asStranger, type Client } from '#tests/support/sign-in.ts';
import { testStart, useTestApp } from '#tests/support/test-app.ts';

const app = useTestApp();
let desk: Desk;
let reader: Client;
beforeAll(async () => {
  desk = await makeDesk(app());
  reader = asStranger(app());
});

const as = async (url: string, sql: string): Promise<unknown[]> => {
  const client = new pg.Client({ connectionString: url });
  await client.connect();
  try {
    return (await client.query(sql)).rows as unknown[];
  } finally {
    await client.end();
  }
};

/** Tables whose rows are record from their first moment, each with a column to try to change. */
const recordTables: [table: string, column: string][] = [
  ['device', 'name'], ['run_sheet_file', 'bytes'], ['run_sheet_secret', 'seal'], ['submission_file', 'bytes'], ['submission_estimate', 'result'], ['submission_move', 'state'], ['submission_message', 'body'],
  ['decision', 'reason'], ['entry', 'gate_class'], ['entry_version', 'summary'], ['entry_bytes', 'bytes'], ['entry_state', 'state'],
  ['log_leaf', 'hash'], ['log_node', 'hash'], ['log_head', 'root_hash'], ['record_signature', 'signature'], ['withdrawal', 'reason'], ['withdrawal_answer', 'note'],
];

describe('what is frozen', () => {
  beforeAll(async () => {
    const id = await inReview(app(), desk, makeDataset(desk, await makeDrawnSheet(app(), desk)));
    await desk.client('post', `/api/v1/submissions/${id}/messages`).send({ body: 'For the record.' });
    await decide(await workFor(app(), desk.curator), id, { outcome: 'accept', reason: 'Sound.', noInterest: true });
    await withdrawn(app(), await accepted(app(), desk, makeDataset(desk, null)), 'the wrong qubit was recorded');
  });

  it.each(recordTables)('%s refuses UPDATE, DELETE and TRUNCATE to the application by grant and to the owner by trigger', async (table, column) => {
    const { url, ownerUrl } = app().database;
    const [row] = (await as(ownerUrl, `select count(*)::int as n from ${table}`)) as { n: number }[];
    expect(row?.n, `${table} has rows to protect`).toBeGreaterThan(0);
    for (const sql of [`update ${table} set ${column} = ${column}`, `delete from ${table}`, `truncate ${table} cascade`]) {
      await expect(as(url, sql), `application: ${sql}`).rejects.toMatchObject({ code: '42501' });
      if (!sql.startsWith('update')) await expect(as(ownerUrl, sql), `owner: ${sql}`).rejects.toMatchObject({ code: 'EB001' });
    }
    await expect(as(ownerUrl, `update ${table} set ${column} = null`)).rejects.toMatchObject({ code: 'EB001' });
    expect(await as(ownerUrl, `select count(*)::int as n from ${table}`)).toEqual([row]);
  });

  it('keeps its triggers in replication mode, and a drawn run sheet stays as it was drawn', async () => {
    const { url, ownerUrl } = app().database;
    const off = await as(ownerUrl, `select tgrelid::regclass::text as t, tgname from pg_trigger where not tgisinternal and tgenabled <> 'A' and tgrelid::regclass::text not like 'pgboss%'`);
    expect(off).toEqual([]);
    await expect(as(url, `update run_sheet set shots = shots + 1 where state = 'drawn'`)).rejects.toMatchObject({ code: 'EB001' });
    await expect(as(url, 'update accession_counter set last = last + 2')).rejects.toMatchObject({ code: 'EB003' });
    await expect(as(url, 'update accession_counter set last = last - 1')).rejects.toMatchObject({ code: 'EB003' });
    await expect(as(url, 'delete from accession_counter')).rejects.toMatchObject({ code: 'EB001' });
    await expect(as(url, 'update log_size set size = size + 2')).rejects.toMatchObject({ code: 'EB003' });
  });

  it('is not fooled by a temporary table of a guarded name', async () => {
    const { url } = app().database;
    const wrong = `insert into entry_state (accession, version, state, at) select accession, version, 'embargoed', now() from entry_version limit 1`;
    await expect(as(url, `create temporary table entry_state (id bigint, accession text, version int, state text); ${wrong.replace('into entry_state', 'into public.entry_state')}`)).rejects.toMatchObject({ code: 'EB003' });
  });

  it('takes no state out of order and no version without an accepting decision', async () => {
    const { url } = app().database;
    await expect(as(url, `insert into entry_state (accession, version, state, at) select accession, version, 'embargoed', now() from entry_version limit 1`)).rejects.toMatchObject({ code: 'EB003' });
    await expect(as(url, `insert into entry_version select gen_random_uuid(), accession, version + 1, (select id from submission where accession is null limit 1), gen_random_uuid(), organisation_id, device_id, gate_class, register, run_sheet_id, title, method, replicates, file_name, file_size, content_id, bytes_sha256, result_sha256, replicates_sha256, ended_at, dataset, summary, sealed_points, review, sealed, accepted_at, embargo_until, demo from entry_version limit 1`)).rejects.toMatchObject({ code: expect.stringMatching(/EB003|23502/) as string });
  });
});

describe('accessions', () => {
  it('leave no gap when a freezing is rolled back', async () => {
    const next = async () => ((await runSql<{ last: number }>(app().deps.orm.em.fork(), 'select last from accession_counter'))[0]?.last ?? 0) + 1;
    const expected = await next();
    const work = await workFor(app(), desk.curator);
    const id = await inReview(app(), desk, makeDataset(desk, null));
    await expect(
      work.em.fork().transactional(async (em) => {
        await decide({ ...work, em }, id, { outcome: 'accept', reason: 'Sound.', noInterest: true });
        throw new Error('the power went');
      }),
    ).rejects.toThrow('the power went');
    expect([await stateOf(app(), id), await next()]).toEqual(['in-review', expected]);
    const { accession } = await accepted(app(), desk, makeDataset(desk, null));
    expect(accession).toBe(`EVB-${String(expected).padStart(6, '0')}`);
  });

  it('are distinct and without gaps when several are frozen at once', async () => {
    const ids = [];
    for (let i = 0; i < 3; i += 1) ids.push(await inReview(app(), desk, makeDataset(desk, null)));
    const entries = await Promise.all(ids.map(async (id) => (await decide(await workFor(app(), desk.curator), id, { outcome: 'accept', reason: 'Sound.', noInterest: true })).entry?.accession ?? ''));
    const numbers = entries.map((a) => Number(a.slice(4))).sort((a, b) => a - b);
    expect(numbers.map((n) => n - (numbers[0] ?? 0))).toEqual([0, 1, 2]);
  });
});

describe('an embargo', () => {
  it('hides everything until its day, seal included, and then makes it public', async () => {
    const { id, accession } = await accepted(app(), desk, makeDataset(desk, await makeDrawnSheet(app(), desk)), { embargoUntil: '2026-05-20' });
    expect(await stateOf(app(), id)).toBe('embargoed');
    for (const path of ['', '/v/1', '/v/1/dataset', '/v/1/result', '/v/1/replicates', '/v/1/seal']) expect((await reader('get', `/api/v1/entries/${accession}${path}`)).status, path).toBe(404);
    expect(JSON.stringify((await reader('get', '/api/v1/entries?limit=200')).body)).not.toContain(accession);
    expect(JSON.stringify((await reader('get', '/api/v1/boards/quarter-turn-1q/1')).body)).not.toContain(accession);
    expect((await desk.client('get', `/api/v1/submissions/${id}`)).body).toMatchObject({ state: 'embargoed', entry: { accession, version: 1 } });
    const work = await workFor(app(), null);
    app().clock.set(new Date('2026-05-19T23:59:00Z'));
    expect(await liftEmbargoes(work)).toBe(0);
    app().clock.set(new Date('2026-05-20T00:07:00Z'));
    expect(await liftEmbargoes(work)).toBe(1);
    expect(await liftEmbargoes(work)).toBe(0);
    expect((await reader('get', `/api/v1/entries/${accession}`)).body).toMatchObject({ state: 'frozen', frozenAt: '2026-05-20T00:07:00.000Z' });
    expect((await reader('get', `/api/v1/entries/${accession}/v/1/seal`)).status).toBe(200);
    app().clock.set(testStart);
  });

  it('that ends after a correction became public leaves the older version superseded', async () => {
    const { id, accession } = await accepted(app(), desk, makeDataset(desk, await makeDrawnSheet(app(), desk)), { embargoUntil: '2026-05-20' });
    await accepted(app(), desk, makeDataset(desk, await makeDrawnSheet(app(), desk)), { correctionOf: accession });
    app().clock.set(new Date('2026-05-20T00:07:00Z'));
    expect(await liftEmbargoes(await workFor(app(), null))).toBe(1);
    expect(await stateOf(app(), id)).toBe('superseded');
    expect((await reader('get', `/api/v1/entries/${accession}`)).body).toMatchObject({ version: 2, state: 'frozen' });
    expect((await reader('get', `/api/v1/entries/${accession}/v/1`)).body).toMatchObject({ version: 1, state: 'superseded' });
    app().clock.set(testStart);
  });

  it('takes no day that is past or more than 180 days ahead', async () => {
    const id = await inReview(app(), desk, makeDataset(desk, null));
    await decide(await workFor(app(), desk.curator), id, { outcome: 'return', reason: 'Again.', noInterest: true });
    for (const day of ['2026-05-04', '2026-11-01']) expect((await desk.client('patch', `/api/v1/submissions/${id}`).send({ embargoUntil: day })).body, day).toMatchObject({ status: 400, errors: [{ pointer: '/embargoUntil' }] });
    expect((await desk.client('patch', `/api/v1/submissions/${id}`).send({ embargoUntil: '2026-10-31' })).status).toBe(200);
  });
});

describe('a correction', () => {
  it('becomes the next version of the entry it names, and supersedes the one before', async () => {
    const sheet = await makeDrawnSheet(app(), desk);
    const acquisition = { startedAt: '2026-05-04T06:00:00Z', endedAt: '2026-05-04T07:00:00Z', software: 'in-house 1.4' };
    const first = await accepted(app(), desk, makeDataset(desk, sheet, { acquisition }), { replicates: 200 });
    const second = await accepted(app(), desk, makeDataset(desk, sheet, { acquisition }), { correctionOf: first.accession, replicates: 200 });
    expect(second).toMatchObject({ accession: first.accession, version: 2 });
    expect([await stateOf(app(), first.id), await stateOf(app(), second.id)]).toEqual(['superseded', 'frozen']);
    const latest = (await reader('get', `/api/v1/entries/${first.accession}`)).body as { version: number; versions: unknown[]; eligibility: { code: string }[] };
    expect(latest).toMatchObject({ version: 2, versions: [{ version: 2, state: 'frozen' }, { version: 1, state: 'superseded' }] });
    expect(latest.eligibility.map((r) => r.code), 'whatever chance did to the sealed check').not.toContain('newer');
    const old = (await reader('get', `/api/v1/entries/${first.accession}/v/1`)).body as { eligibility: { code: string; sentence: string }[] };
    expect(old).toMatchObject({ version: 1, state: 'superseded' });
    expect(old.eligibility.find((r) => r.code === 'newer')?.sentence).toContain(`${first.accession}.2`);
  });
});

describe('a withdrawn version', () => {
  it('keeps its page and answers 410 for its data', async () => {
    const { accession } = await accepted(app(), desk, makeDataset(desk, null));
    await withdrawn(app(), { accession, version: 1 }, 'the wrong qubit was recorded');
    expect((await reader('get', `/api/v1/entries/${accession}`)).body).toMatchObject({ state: 'withdrawn', eligibility: expect.arrayContaining([expect.objectContaining({ code: 'withdrawn' })]) as unknown });
    for (const kind of ['dataset', 'replicates']) expect((await reader('get', `/api/v1/entries/${accession}/v/1/${kind}`)).body, kind).toMatchObject({ status: 410, code: 'withdrawn' });
    expect((await reader('get', `/api/v1/entries/${accession}/v/1/result`)).status).toBe(200);
  });
});

describe('lists', () => {
  it('give every entry once over pages of any size, newest first, and refuse a made-up cursor', async () => {
    type Page = { items: { accession: string; frozenAt: string }[]; nextCursor: string | null };
    const whole = ((await reader('get', '/api/v1/entries?limit=200')).body as Page).items;
    expect(whole.length).toBeGreaterThan(4);
    const seen: string[] = [];
    let cursor: string | null = '';
    while (cursor !== null) {
      const page: Page = (await reader('get', `/api/v1/entries?limit=2${cursor === '' ? '' : `&cursor=${cursor}`}`)).body as Page;
      seen.push(...page.items.map((i) => i.accession));
      cursor = page.nextCursor;
    }
    expect(seen).toEqual(whole.map((i) => i.accession));
    expect(whole.map((i) => i.frozenAt)).toEqual([...whole.map((i) => i.frozenAt)].sort().reverse());
    for (const bad of ['abc', Buffer.from('["x"]').toString('base64url'), Buffer.from('["no time","EVB-000001"]').toString('base64url')]) expect((await reader('get', `/api/v1/entries?cursor=${bad}`)).body).toMatchObject({ status: 400, code: 'invalid-request' });
  });

  it('search by device, provider and accession takes % and _ as letters', async () => {
    const count = async (query: string) => ((await reader('get', `/api/v1/entries?${query}`)).body as { items: unknown[] }).items.length;
    expect(await count(`q=${encodeURIComponent(desk.device.name)}`)).toBeGreaterThan(0);
    expect(await count('q=EVB-000001')).toBe(1);
    expect(await count(`q=${encodeURIComponent('%')}`)).toBe(0);
    expect(await count(`q=${encodeURIComponent('EVB_')}`)).toBe(0);
    expect(await count(`provider=${desk.organisation.slug}`)).toBeGreaterThan(0);
    expect(await count('gateClass=half-turn-1q/1')).toBe(0);
  });

  it('a dataset sent without gzip comes back byte for byte, odd spacing included', async () => {
    const odd = Buffer.from(bytesOf(makeDataset(desk, null)).toString().replace('"format"', '\t"format"   '));
    const { receiveSubmission } = await import('#api/modules/submissions/receive.ts');
    const { id } = await receiveSubmission(await workFor(app(), desk.contributor), { organisation: desk.organisation.id, bytes: odd, name: 'ödd "name".json', replicates: 5 });
    const back = await desk.client('get', `/api/v1/submissions/${id}/dataset`).buffer(true).parse((response, done) => {
      const parts: Buffer[] = [];
      const stream = response as unknown as NodeJS.ReadableStream;
      stream.on('data', (part: Buffer) => parts.push(part));
      stream.on('end', () => done(null, Buffer.concat(parts)));
    });
    expect(Buffer.compare(back.body as Buffer, odd)).toBe(0);
  });
});
