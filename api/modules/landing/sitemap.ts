import type { EntityManager } from '@mikro-orm/postgresql';
import { AppError } from '#shared/errors/app-error.ts';
import { gateClasses } from '#shared/domain/gate-classes.ts';
import { writeSitemap, writeSitemapIndex } from '#shared/landing/feed.ts';
import { runSql } from '#api/lib/run-sql.ts';

/** Versions on one sitemap; a sitemap may hold 50,000 addresses. */
const versionsOnPage = 20_000;

const publicCount = async (em: EntityManager): Promise<number> => (await runSql<{ count: number }>(em, `select count(*)::int as count from entry_state where state = 'frozen'`))[0]?.count ?? 0;

/** The list of sitemaps: one of the standing pages, and one for every so many versions. */
export const readSitemapIndex = async (em: EntityManager, registry: string): Promise<string> => {
  const pages = Math.ceil((await publicCount(em)) / versionsOnPage);
  return writeSitemapIndex([`${registry}/sitemap/pages.xml`, ...Array.from({ length: pages }, (_, i) => `${registry}/sitemap/entries-${i}.xml`)]);
};

/** Pages that are there whatever is in the registry, boards and devices. */
export const readStandingPages = async (em: EntityManager, registry: string): Promise<string> => {
  const devices = await runSql<{ device_id: string }>(em, `select distinct v.device_id from entry_version v join entry_state s on s.accession = v.accession and s.version = v.version and s.state = 'frozen' order by 1`);
  const paths = ['/', '/boards', '/devices', '/method', '/log', '/schema', ...gateClasses.filter(({ ranked }) => ranked).map(({ id }) => `/boards/${id}`), ...devices.map(({ device_id: id }) => `/devices/${encodeURIComponent(id)}`)];
  return writeSitemap(paths.map((path) => ({ url: `${registry}${path}` })));
};

/** Pages of public versions in the order in which they became public, and of an entry with its first. */
export const readEntryPages = async (em: EntityManager, page: number, registry: string): Promise<string> => {
  const rows = await runSql<{ accession: string; version: number; changed: string }>(
    em,
    `select s.accession, s.version, (select max(n.at) from entry_state n where n.accession = s.accession and n.version = s.version) as changed
       from entry_state s where s.state = 'frozen' order by s.id limit $1 offset $2`,
    [versionsOnPage, page * versionsOnPage],
  );
  if (rows.length === 0) throw new AppError('not-found', `There is no sitemap entries-${page}.xml.`);
  return writeSitemap(rows.flatMap(({ accession, version, changed }) => {
    const day = new Date(changed).toISOString().slice(0, 10);
    return [...(version === 1 ? [{ url: `${registry}/entries/${accession}`, day }] : []), { url: `${registry}/entries/${accession}/v/${version}`, day }];
  }));
};
