import { mkdtempSync, readFileSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { startDoiStandIn, type DoiStandIn } from '#api/fakes/doi/start.ts';
import { runSql } from '#api/lib/run-sql.ts';
import { registerDois } from '#api/modules/citations/register-dois.ts';
import { liftEmbargoes } from '#api/modules/entries/freeze.ts';
import { decide } from '#api/modules/reviews/service.ts';
import { accepted, inReview, withdrawn } from '#tests/support/life.ts';
import { makeDataset, makeDesk, workFor, type Desk } from '#tests/support/record.ts';
import { testStart, useTestApp } from '#tests/support/test-app.ts';

const app = useTestApp();
const folder = mkdtempSync(join(tmpdir(), 'evenbeam-dois-'));
let agency: DoiStandIn;
let desk: Desk;

beforeAll(async () => {
  desk = await makeDesk(app());
  agency = await startDoiStandIn(folder, 'local-only');
  app().deps.config.doi = { url: agency.url, user: agency.user, password: agency.password, prefix: agency.prefix };
});
afterAll(async () => {
  await agency.stop();
  rmSync(folder, { recursive: true });
});

interface Row {
  doi: string;
  told: number;
  revision: number;
  attempts: number;
  last_error: string | null;
  next_try_at: string;
  registered_at: string | null;
}
const rowOf = async ({ accession, version }: { accession: string; version: number }): Promise<Row | undefined> => (await runSql<Row>(app().deps.orm.em.fork(), 'select * from doi_registration where accession = $1 and version = $2', [accession, version]))[0];
const run = (): Promise<void> => registerDois(app().deps.orm.em.fork(), app().deps, new AbortController().signal);
const later = (seconds: number): void => app().clock.set(new Date(app().clock.now().getTime() + seconds * 1000));
const heard = (doi: string) => readFileSync(agency.file, 'utf8').split('\n').filter(Boolean).map((line) => JSON.parse(line) as { doi: string; method: string; event: string; attributes: { url: string; dates: { dateType: string }[]; relatedIdentifiers: { relationType: string; relatedIdentifier: string }[] } }).filter((r) => r.doi === doi);

describe('a DOI', () => {
  it('is owed with the freezing, goes back with it, and is registered once with the metadata of the version', async () => {
    const id = await inReview(app(), desk, makeDataset(desk, null));
    const work = await workFor(app(), desk.curator);
    await expect(work.em.fork().transactional(async (em) => {
      await decide({ ...work, em }, id, { outcome: 'accept', reason: 'Sound.', noInterest: true });
      throw new Error('the power went');
    })).rejects.toThrow('the power went');
    expect(await runSql(app().deps.orm.em.fork(), 'select 1 from doi_registration')).toEqual([]);
    const { entry } = await decide(work, id, { outcome: 'accept', reason: 'Sound.', noInterest: true });
    expect(await rowOf(entry!)).toMatchObject({ doi: `10.5072/${entry!.accession.toLowerCase()}.1`, told: 0, registered_at: null });
    await run();
    await run();
    const row = (await rowOf(entry!))!;
    expect(row).toMatchObject({ told: 1, attempts: 1, last_error: null });
    expect(heard(row.doi)).toMatchObject([{ method: 'POST', event: 'publish', attributes: { url: `${app().deps.config.publicUrl}/entries/${entry!.accession}/v/1` } }]);
  });

  it('is tried again after a pause that doubles, while the agency is away, and then registered', async () => {
    const name = await accepted(app(), desk, makeDataset(desk, null));
    agency.failNext(2, 503);
    await run();
    expect(await rowOf(name)).toMatchObject({ told: 0, attempts: 1, last_error: expect.stringContaining('503') as string });
    await run();
    expect((await rowOf(name))?.attempts).toBe(1);
    later(31);
    await run();
    expect((await rowOf(name))?.attempts).toBe(2);
    later(59);
    await run();
    expect((await rowOf(name))?.attempts).toBe(2);
    later(2);
    await run();
    expect(await rowOf(name)).toMatchObject({ told: 1, attempts: 3, last_error: null });
  });

  it('is not minted twice when the answer is lost after the agency has registered it', async () => {
    const name = await accepted(app(), desk, makeDataset(desk, null));
    agency.failNext(1, 500, true);
    await run();
    expect(await rowOf(name)).toMatchObject({ told: 0, registered_at: null });
    later(31);
    await run();
    const row = (await rowOf(name))!;
    expect(row).toMatchObject({ told: 1, last_error: null });
    expect(heard(row.doi).map((r) => r.method)).toEqual(['POST', 'PUT']);
    expect(agency.registered().filter((r) => r.doi.includes(name.accession.toLowerCase()))).toHaveLength(1);
  });

  it('is sent once when two workers look at the same time', async () => {
    const name = await accepted(app(), desk, makeDataset(desk, null));
    await Promise.all([run(), run(), run()]);
    const row = (await rowOf(name))!;
    expect(row.told).toBe(1);
    expect(heard(row.doi)).toHaveLength(1);
  });

  it('of an earlier version is told of its successor; of a withdrawn one that it was withdrawn, and it stays', async () => {
    const first = await accepted(app(), desk, makeDataset(desk, null));
    await run();
    const second = await accepted(app(), desk, makeDataset(desk, null), { correctionOf: first.accession });
    await run();
    await run();
    const [one, two] = [(await rowOf(first))!, (await rowOf(second))!];
    expect([one.told, two.told]).toEqual([2, 1]);
    expect(heard(two.doi).at(-1)?.attributes.relatedIdentifiers).toContainEqual({ relatedIdentifier: one.doi, relatedIdentifierType: 'DOI', relationType: 'IsNewVersionOf' });
    expect(heard(one.doi).at(-1)?.attributes.relatedIdentifiers.map((r) => r.relationType)).toContain('IsPreviousVersionOf');
    await withdrawn(app(), second, 'the wrong qubit was recorded');
    await run();
    const last = heard(two.doi).at(-1)!;
    expect([last.method, last.event, last.attributes.dates.map((d) => d.dateType)]).toEqual(['PUT', 'hide', ['Available', 'Collected', 'Withdrawn']]);
    expect((await rowOf(second))?.registered_at).not.toBeNull();
  });

  it('is owed to an entry under embargo on the day it becomes public, and to a demonstration never', async () => {
    const kept = await accepted(app(), desk, makeDataset(desk, null), { embargoUntil: '2026-05-20' });
    const invented = await accepted(app(), desk, makeDataset(desk, null), { demo: true });
    expect([await rowOf(kept), await rowOf(invented)]).toEqual([undefined, undefined]);
    app().clock.set(new Date('2026-05-20T00:07:00Z'));
    await liftEmbargoes(await workFor(app(), null));
    expect((await rowOf(kept))?.told).toBe(0);
    await run();
    expect([(await rowOf(kept))?.told, await rowOf(invented)]).toEqual([1, undefined]);
    app().clock.set(testStart);
  });

  it('is neither owed nor shown without an agency, and is made up for once there is one', async () => {
    const { doi } = app().deps.config;
    app().deps.config.doi = null;
    const name = await accepted(app(), desk, makeDataset(desk, null));
    await run();
    expect(await rowOf(name)).toBeUndefined();
    app().deps.config.doi = doi;
    await run();
    expect((await rowOf(name))?.told).toBe(1);
  });

  it('cannot be changed or removed in the database', async () => {
    const em = app().deps.orm.em.fork();
    await expect(runSql(em, `update doi_registration set doi = '10.5072/other'`)).rejects.toMatchObject({ code: 'EB001' });
    await expect(runSql(em, 'delete from doi_registration')).rejects.toMatchObject({ code: 'EB001' });
  });
});

describe('the stand-in', () => {
  it('knows after a restart what it was told, refuses strangers, unknown prefixes and metadata without what is required', async () => {
    const again = await startDoiStandIn(folder, 'another');
    expect(again.registered().length).toBe(agency.registered().length);
    const ask = (attributes: object, password = 'another') => fetch(`${again.url}/dois`, { method: 'POST', headers: { authorization: `Basic ${Buffer.from(`${again.user}:${password}`).toString('base64')}`, 'content-type': 'application/vnd.api+json' }, body: JSON.stringify({ data: { attributes } }) });
    const [taken] = again.registered();
    expect((await ask({ doi: taken!.doi }, 'wrong')).status).toBe(401);
    expect(await (await ask({ doi: taken!.doi })).text()).toContain('already been taken');
    expect((await ask({ doi: '10.1234/x' })).status).toBe(403);
    expect(await (await ask({ doi: '10.5072/new' })).text()).toContain("can't be blank");
    await again.stop();
  });
});
