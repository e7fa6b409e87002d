import { createHash } from 'node:crypto';
import { JSDOM } from 'jsdom';

export interface Checked {
  versions: number;
  links: number;
  faults: string[];
}

export interface Answer {
  status: number;
  headers: Headers;
  body: Buffer;
}

interface Link {
  href: string;
  rel: string;
  type: string | null;
}

/** Link header by RFC 8288, as far as one is written here: <target>; name="value". */
export const parseLinks = (header: string): Link[] =>
  [...header.matchAll(/<([^>]*)>((?:\s*;\s*[a-z]+="[^"]*")*)/g)].map(([, href = '', rest = '']) => {
    const values = new Map([...rest.matchAll(/([a-z]+)="([^"]*)"/g)].map(([, k = '', v = '']) => [k, v]));
    return { href, rel: values.get('rel') ?? '', type: values.get('type') ?? null };
  });

/** schema.org Dataset: what search services require (name, description) and recommend, and what FAIR checks look for. From their guides, by memory. */
const wanted = ['@context', '@type', '@id', 'url', 'name', 'description', 'identifier', 'version', 'license', 'creator', 'publisher', 'includedInDataCatalog', 'datePublished', 'dateModified', 'temporalCoverage', 'keywords', 'isAccessibleForFree', 'measurementTechnique', 'variableMeasured', 'creativeWorkStatus'];
const forms = ['application/ld+json', 'application/vnd.datacite.datacite+json', 'application/vnd.datacite.datacite+xml', 'application/vnd.citationstyles.csl+json', 'application/x-bibtex', 'application/x-research-info-systems', 'application/json', 'application/linkset+json'];
/** How browsers ask for a page. */
const browser = 'text/html,application/xhtml+xml,application/xml;q=0.9,image/avif,image/webp,*/*;q=0.8';

const typeOf = (answer: Answer): string => (answer.headers.get('content-type') ?? '').split(';')[0] ?? '';
const isBlank = (value: unknown): boolean => value === undefined || value === null || value === '' || (Array.isArray(value) && value.length === 0);

/**
 * Finds faults in the landing pages of a registry as a machine sees them. `registry`: the address it gives out; `base`: where it
 * answers; `alter` spoils answers of the one entry `only`, to show that a fault is found.
 */
export const checkLandingPages = async (base: string, registry: string, { alter = (answer) => answer, only }: { alter?: (answer: Answer) => Answer; only?: string } = {}): Promise<Checked> => {
  const faults: string[] = [];
  const seen = new Map<string, Answer>();
  const ask = async (url: string, accept = '*/*'): Promise<Answer> => {
    const response = await fetch(url.replace(registry, base), { headers: { accept }, redirect: 'manual' });
    return alter({ status: response.status, headers: new Headers(response.headers), body: Buffer.from(await response.arrayBuffer()) });
  };
  const follow = async (where: string, url: string, type: string | null): Promise<Answer | null> => {
    if (!url.startsWith(registry)) {
      if (!/^https:\/\/(orcid\.org|creativecommons\.org|spdx\.org|schema\.org|doi\.org)\/\S+$/.test(url)) faults.push(`${where}: ${url} is no address of this registry nor one it may send to`);
      return null;
    }
    const answer = seen.get(url) ?? (await ask(url, type ?? '*/*'));
    seen.set(url, answer);
    if (answer.status !== 200) faults.push(`${where}: ${url} answers ${answer.status}`);
    else if (type !== null && typeOf(answer) !== type) faults.push(`${where}: ${url} is ${typeOf(answer)}, announced as ${type}`);
    return answer;
  };

  const listed = async (): Promise<{ accession: string; versions: { version: number; state: string }[] }[]> => {
    const found = [];
    let cursor: string | null = '';
    while (cursor !== null) {
      const page = JSON.parse((await ask(`${registry}/api/v1/entries?limit=100${cursor === '' ? '' : `&cursor=${cursor}`}`)).body.toString()) as { items: { accession: string }[]; nextCursor: string | null };
      for (const { accession } of page.items) found.push({ accession, versions: (JSON.parse((await ask(`${registry}/api/v1/entries/${accession}`)).body.toString()) as { versions: { version: number; state: string }[] }).versions });
      cursor = page.nextCursor;
    }
    return found;
  };

  const checkPage = async (url: string, page: string, state: string): Promise<void> => {
    const fault = (text: string): void => void faults.push(`${url}: ${text}`);
    const answer = await ask(url, browser);
    if (answer.status !== 200 || typeOf(answer) !== 'text/html') return fault(`answers ${answer.status} ${typeOf(answer)} to a browser`);
    if (!(answer.headers.get('vary') ?? '').toLowerCase().includes('accept')) fault('does not vary by Accept');
    const { document } = new JSDOM(answer.body.toString()).window;
    const only = (selector: string, attribute: string): string => {
      const all = [...document.head.querySelectorAll(selector)];
      if (all.length !== 1) fault(`has ${all.length} of ${selector}`);
      return all[0]?.getAttribute(attribute) ?? all[0]?.textContent ?? '';
    };
    if (only('title', 'none') === '' || only('meta[name=description]', 'content').length < 50) fault('has no title or no description of 50 characters');
    if (only('link[rel=canonical]', 'href') !== page) fault('is not canonical under the address of its version');
    for (const name of ['citation_title', 'citation_author', 'citation_publication_date', 'citation_publisher']) if (!document.head.querySelector(`meta[name=${name}]`)?.getAttribute('content')) fault(`has no ${name}`);

    const data = JSON.parse(only('script[type="application/ld+json"]', 'none')) as Record<string, unknown>;
    for (const property of wanted) if (isBlank(data[property])) fault(`its JSON-LD has no ${property}`);
    if (data['@type'] !== 'Dataset' || data.url !== page) fault('its JSON-LD is no Dataset of this page');
    const length = String(data.description).length;
    if (length < 50 || length > 5000) fault(`its description has ${length} characters, 50 to 5000 are taken`);
    const files = (data.distribution ?? []) as { contentUrl: string; encodingFormat: string; contentSize?: string; sha256?: string; name?: string }[];
    if ((files.length === 0) !== (state === 'withdrawn')) fault(`is ${state} and names ${files.length} files`);
    for (const file of files) {
      const bytes = await follow(url, file.contentUrl, file.encodingFormat);
      if (file.contentSize && bytes && `${bytes.body.length} B` !== file.contentSize) fault(`${file.contentUrl} has ${bytes.body.length} bytes, not ${file.contentSize}`);
      if (file.sha256 && bytes && createHash('sha256').update(bytes.body).digest('hex') !== file.sha256) fault(`${file.contentUrl} has another SHA-256`);
    }

    const links = parseLinks(answer.headers.get('link') ?? '');
    const count = (rel: string): number => links.filter((l) => l.rel === rel).length;
    for (const rel of ['cite-as', 'license', 'linkset', 'latest-version']) if (count(rel) !== 1) fault(`has ${count(rel)} links ${rel}`);
    if (count('describedby') === 0 || !links.some((l) => l.rel === 'type' && l.href === 'https://schema.org/AboutPage') || !links.some((l) => l.rel === 'type' && l.href === 'https://schema.org/Dataset')) fault('lacks describedby or its two types');
    const withOrcid = (data.creator as { identifier?: string }[]).filter((c) => c.identifier).length;
    if (count('author') !== withOrcid) fault(`has ${count('author')} author links for ${withOrcid} ORCID iDs`);
    if (links.filter((l) => l.rel === 'item').map((l) => l.href).join() !== files.map((f) => f.contentUrl).join()) fault('its items are not its files');
    for (const link of links) await follow(url, link.href, link.type);

    const set = links.find((l) => l.rel === 'linkset');
    const linkset = (JSON.parse((await ask(set?.href ?? '')).body.toString()) as { linkset: ({ anchor: string } & Record<string, { href: string; type?: string }[]>)[] }).linkset;
    const own = linkset.filter(({ anchor }) => anchor === page);
    const flat = own.flatMap(({ anchor: _anchor, ...byRel }) => Object.entries(byRel).flatMap(([rel, targets]) => targets.map(({ href }) => `${rel} ${href}`)));
    if ([...flat].sort().join('\n') !== links.filter((l) => l.rel !== 'linkset').map(({ rel, href }) => `${rel} ${href}`).sort().join('\n')) fault('its linkset is not what its Link header says');
    for (const { anchor, collection, describes } of linkset.filter((l) => l.anchor !== page)) {
      await follow(url, anchor, null);
      if ((collection ?? describes)?.[0]?.href !== page) fault(`the linkset does not lead back from ${anchor}`);
    }

    for (const form of forms) {
      const other = await ask(url, form);
      if (other.status !== 303) fault(`answers ${other.status} to ${form}`);
      else await follow(url, other.headers.get('location') ?? '', form);
    }
    for (const accept of ['*/*', 'image/png', '', 'text/html;q=0.5, application/ld+json;q=0.4']) if (typeOf(await ask(url, accept)) !== 'text/html') fault(`is no page to Accept ${JSON.stringify(accept)}`);
  };

  const entries = (await listed()).filter(({ accession }) => only === undefined || accession === only);
  let versions = 0;
  const index = (await ask(`${registry}/sitemap.xml`)).body.toString();
  let sitemap = '';
  for (const [, loc = ''] of index.matchAll(/<loc>([^<]*)<\/loc>/g)) sitemap += (await follow('sitemap.xml', loc, 'application/xml'))?.body.toString() ?? '';
  for (const { accession, versions: all } of entries) {
    for (const { version, state } of all) {
      versions += 1;
      const page = `${registry}/entries/${accession}/v/${version}`;
      await checkPage(page, page, state);
      if (!sitemap.includes(`<loc>${page}</loc>`)) faults.push(`${page} is not on the sitemap`);
    }
    const [latest] = [...all].sort((a, b) => b.version - a.version);
    await checkPage(`${registry}/entries/${accession}`, `${registry}/entries/${accession}/v/${latest?.version}`, latest?.state ?? '');
  }
  return { versions, links: seen.size, faults };
};
