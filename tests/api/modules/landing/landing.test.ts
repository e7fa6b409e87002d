import { createServer, type Server } from 'node:http';
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { JSDOM } from 'jsdom';
import { SaxesParser } from 'saxes';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { readFeed } from '#api/modules/landing/feed.ts';
import { feedPage } from '#shared/landing/feed.ts';
import { accepted, withdrawn } from '#tests/support/life.ts';
import { checkLandingPages, type Answer } from '#tests/support/landing-checker.ts';
import { makeDataset, makeDesk, makeDrawnSheet, type Desk } from '#tests/support/record.ts';
import { useTestApp } from '#tests/support/test-app.ts';

const webRoot = mkdtempSync(join(tmpdir(), 'evenbeam-landing-'));
writeFileSync(join(webRoot, 'index.html'), '<!doctype html><html lang="en"><head><meta charset="utf-8" /><meta name="description" content="The registry." /></head><body><div id="root"></div></body></html>');
const registry = 'https://evenbeam.example';
const app = useTestApp({ settings: { WEB_ROOT: webRoot, PUBLIC_URL: registry, GOOGLE_AUTHORIZATION_URL: 'https://accounts.example/authorize' } });
const hostile = `"></title></script><script>alert(1)</script><!-- '<b>`;
let server: Server;
let base = '';
let desk: Desk;
const names: Record<'ranked' | 'superseded' | 'newer' | 'withdrawn' | 'embargoed' | 'hostile', { accession: string; version: number }> = {} as never;

beforeAll(async () => {
  desk = await makeDesk(app());
  names.ranked = await accepted(app(), desk, makeDataset(desk, await makeDrawnSheet(app(), desk)));
  names.superseded = await accepted(app(), desk, makeDataset(desk, null));
  names.newer = await accepted(app(), desk, makeDataset(desk, null), { correctionOf: names.superseded.accession });
  names.withdrawn = await accepted(app(), desk, makeDataset(desk, null));
  await withdrawn(app(), names.withdrawn, 'The wrong qubit was recorded.');
  names.embargoed = await accepted(app(), desk, makeDataset(desk, null), { embargoUntil: '2026-05-20' });
  names.hostile = await accepted(app(), desk, makeDataset(desk, null, { title: hostile, contributors: [{ name: hostile, orcid: '0000-0002-1825-0097' }, { name: 'B. Other' }] }));
  server = createServer(app().app);
  await new Promise<void>((done) => server.listen(0, '127.0.0.1', done));
  const address = server.address();
  base = `http://127.0.0.1:${typeof address === 'object' && address ? address.port : 0}`;
});
afterAll(async () => {
  server.closeAllConnections();
  await new Promise((done) => server.close(done));
  rmSync(webRoot, { recursive: true });
});

const get = (path: string, accept = 'text/html'): Promise<Response> => fetch(`${base}${path}`, { headers: { accept }, redirect: 'manual' });
const documentAt = async (path: string): Promise<Document> => new JSDOM(await (await get(path)).text()).window.document;
const tagsOf = (xml: string): string[] => {
  const tags: string[] = [];
  const parser = new SaxesParser({ xmlns: true });
  parser.on('error', (fault) => { throw fault; });
  parser.on('opentag', ({ name }) => tags.push(name));
  parser.write(xml).close();
  return tags;
};

describe('the landing pages of a registry', () => {
  it('have no broken link and no missing property, whatever became of the version', async () => {
    const { versions, links, faults } = await checkLandingPages(base, registry);
    expect(faults).toEqual([]);
    expect(versions).toBe(5);
    expect(links).toBeGreaterThan(versions * 12);
  });

  it.each<[string, RegExp, (answer: Answer) => void]>([
    ['a lost property', /its JSON-LD has no license/, (answer) => { answer.body = Buffer.from(answer.body.toString().replace(/"license":"[^"]*",/, '')); }],
    ['a lost link', /has 0 links cite-as/, (answer) => answer.headers.set('link', (answer.headers.get('link') ?? '').replace('"cite-as"', '"cite"'))],
    ['a file that is gone', /replicates answers 404/, (answer) => { if (answer.headers.get('content-type')?.startsWith('application/octet')) answer.status = 404; }],
    ['a changed file', /replicates has another SHA-256/, (answer) => { if (answer.headers.get('content-type')?.startsWith('application/octet')) answer.body = Buffer.alloc(answer.body.length); }],
    ['an unannounced type', /is text\/plain, announced as application\/x-bibtex/, (answer) => { if (answer.headers.get('content-type')?.startsWith('application/x-bibtex')) answer.headers.set('content-type', 'text/plain'); }],
  ])('are found wanting for %s', async (_what, told, spoil) => {
    const alter = (answer: Answer): Answer => {
      spoil(answer);
      return answer;
    };
    const { faults } = await checkLandingPages(base, registry, { alter, only: names.ranked.accession });
    expect(faults.filter((fault) => told.test(fault)).length).toBeGreaterThan(0);
  });

  it('are 404 with the page for what is not public, and say nothing of it', async () => {
    for (const path of [`/entries/${names.embargoed.accession}`, `/entries/${names.embargoed.accession}/v/1`, '/entries/EVB-999999', '/entries/nonsense', `/entries/${names.ranked.accession}/v/2`, `/entries/${names.ranked.accession}/v/0`, `/entries/${names.ranked.accession}/v/x`]) {
      const answer = await get(path);
      expect([path, answer.status, answer.headers.get('link'), answer.headers.get('content-type')?.split(';')[0]]).toEqual([path, 404, null, 'text/html']);
      expect(await answer.text()).toContain('id="root"');
    }
    for (const path of ['/sitemap/entries-0.xml', '/feed.atom']) expect(await (await get(path)).text()).not.toContain(names.embargoed.accession);
    for (const form of ['linkset', 'schema-org', 'citation']) expect((await get(`/api/v1/entries/${names.embargoed.accession}/v/1/${form}`, '*/*')).status).toBe(404);
  });

  it('of a withdrawn version stay, say why, name no data, and keep the citation', async () => {
    const { accession } = names.withdrawn;
    const data = JSON.parse((await documentAt(`/entries/${accession}`)).querySelector('script[type="application/ld+json"]')?.textContent ?? '') as Record<string, unknown>;
    expect(data).toMatchObject({ creativeWorkStatus: 'Withdrawn', isAccessibleForFree: false, conditionsOfAccess: expect.stringContaining('The wrong qubit was recorded.') as string });
    expect(data).not.toHaveProperty('distribution');
    expect((await get(`/api/v1/entries/${accession}/v/1/dataset`, '*/*')).status).toBe(410);
    expect(await (await get(`/api/v1/entries/${accession}/v/1/citation?format=bibtex`, '*/*')).text()).toContain(accession);
  });

  it('link versions both ways', async () => {
    const relations = async (version: number) => (await get(`/entries/${names.newer.accession}/v/${version}`)).headers.get('link') ?? '';
    expect(await relations(1)).toContain(`</entries/${names.newer.accession}/v/2>; rel="successor-version"`.replace('</', `<${registry}/`));
    expect(await relations(2)).toContain(`<${registry}/entries/${names.newer.accession}/v/1>; rel="predecessor-version"`);
  });

  it('hold a hostile title and name as text: no script, element or attribute comes of them', async () => {
    const page = await documentAt(`/entries/${names.hostile.accession}`);
    expect(page.querySelectorAll('script')).toHaveLength(1);
    expect(page.querySelectorAll('b')).toHaveLength(0);
    expect(page.querySelector('meta[name=citation_author]')?.getAttribute('content')).toBe(hostile);
    expect(JSON.parse(page.querySelector('script')?.textContent ?? '')).toMatchObject({ alternateName: hostile, creator: [{ name: hostile }, { name: 'B. Other' }] });
    expect(tagsOf(await (await get('/feed.atom')).text())).not.toContain('b');
  });
});

describe('the citation address', () => {
  const types = { bibtex: 'application/x-bibtex', ris: 'application/x-research-info-systems', csl: 'application/vnd.citationstyles.csl+json', cff: 'application/yaml', datacite: 'application/vnd.datacite.datacite+json', 'datacite-xml': 'application/vnd.datacite.datacite+xml' };
  it('gives every format under its media type, three styles without one, and refuses others by name', async () => {
    const path = `/api/v1/entries/${names.ranked.accession}/v/1/citation`;
    for (const [format, type] of Object.entries(types)) {
      const answer = await get(`${path}?format=${format}`, '*/*');
      expect([format, answer.status, answer.headers.get('content-type')]).toEqual([format, 200, `${type}; charset=utf-8`]);
      expect(await answer.text()).toContain(`${names.ranked.accession}`);
    }
    const choice = (await (await get(path, '*/*')).json()) as { styles: { text: string }[]; doi: unknown };
    expect(choice.styles).toHaveLength(3);
    expect(choice.doi).toBeNull();
    for (const { text } of choice.styles) expect(text).toContain(`${registry}/entries/${names.ranked.accession}/v/1`);
    const refused = await get(`${path}?format=endnote`, '*/*');
    expect([refused.status, await refused.text()]).toEqual([400, expect.stringContaining('endnote')]);
  });
});

describe('the feed', () => {
  it('tells of every freezing and withdrawal, newest first, as well-formed Atom', async () => {
    const text = await (await get('/feed.atom')).text();
    const tags = tagsOf(text);
    for (const tag of ['feed', 'id', 'title', 'updated', 'entry', 'author', 'published', 'summary']) expect(tags).toContain(tag);
    const ids = [...text.matchAll(/<id>([^<]*#[a-z]+)<\/id>/g)].map(([, id]) => id);
    expect(ids).toHaveLength(6);
    expect(new Set(ids).size).toBe(6);
    expect(ids[0]).toBe(`${registry}/entries/${names.hostile.accession}/v/1#frozen`);
    expect(ids[1]).toBe(`${registry}/entries/${names.withdrawn.accession}/v/1#withdrawn`);
    expect(text).not.toContain('prev-archive');
    expect((await get('/feed/0.atom')).status).toBe(404);
    expect(feedPage).toBeGreaterThan(ids.length);
  });
});

describe('the archive pages of the feed', () => {
  const ids = (text: string): string[] => [...text.matchAll(/<id>([^<]*#[a-z]+)<\/id>/g)].map(([, id = '']) => id);
  const linkIn = (text: string, rel: string): string | null => new RegExp(`rel="${rel}"[^>]*href="([^"]*)"`).exec(text)?.[1] ?? null;
  const read = (archive: number | null, onPage: number) => readFeed(app().deps.orm.em.fork(), archive, registry, onPage);

  it.each([1, 2, 3, 4, 6])('of %i events each lead from the feed to the oldest and leave out no event (RFC 5005)', async (onPage) => {
    const all = ids(await read(null, 1000));
    expect(all).toHaveLength(6);
    let text = await read(null, onPage);
    const seen = new Set(ids(text));
    const pages: string[] = [];
    for (let before = linkIn(text, 'prev-archive'); before !== null; before = linkIn(text, 'prev-archive')) {
      pages.push(before);
      text = await read(Number(/feed\/(\d+)\.atom$/.exec(before)?.[1]), onPage);
      expect(tagsOf(text)).toContain('fh:archive');
      expect([ids(text).length, linkIn(text, 'current')]).toEqual([onPage, `${registry}/feed.atom`]);
      for (const id of ids(text)) seen.add(id);
    }
    expect(pages).toEqual(Array.from({ length: Math.floor(6 / onPage) }, (_, i) => `${registry}/feed/${Math.floor(6 / onPage) - 1 - i}.atom`));
    expect([...seen].sort()).toEqual([...all].sort());
  });
});

describe('robots and sitemaps', () => {
  it('robots.txt leads to the sitemap', async () => {
    expect(await (await get('/robots.txt', '*/*')).text()).toContain(`Sitemap: ${registry}/sitemap.xml`);
    expect((await get('/sitemap/entries-7.xml', '*/*')).status).toBe(404);
  });
});
