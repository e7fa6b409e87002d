import { writeXml, type XmlTree } from '#shared/citation/xml.ts';

/** An event of the log as the feed tells it. */
export interface FeedItem {
  event: 'frozen' | 'withdrawn';
  accession: string;
  version: number;
  at: string;
  title: string;
  authors: readonly string[];
  summary: string;
}

/** Events on one archive page. The log only grows, so a full page never changes. */
export const feedPage = 50;

export interface Feed {
  registry: string;
  /** Number of the archive page, counted from the oldest; null: the feed that readers subscribe to. */
  archive: number | null;
  /** Number of full pages. */
  archives: number;
  /** Newest first. */
  items: readonly FeedItem[];
}

const archiveUrl = (registry: string, page: number): string => `${registry}/feed/${page}.atom`;

const entryOf = (registry: string) => ({ event, accession, version, at, title, authors, summary }: FeedItem): XmlTree => {
  const page = `${registry}/entries/${accession}/v/${version}`;
  return {
    id: `${page}#${event}`,
    title: `${event === 'frozen' ? '' : 'Withdrawn: '}${accession}.${version}: ${title}`,
    published: at,
    updated: at,
    author: authors.map((name) => ({ name })),
    link: { '@rel': 'alternate', '@type': 'text/html', '@href': page },
    category: { '@term': event },
    summary,
  };
};

/** Atom (RFC 4287) with archive pages (RFC 5005, section 4): the current feed leads to the newest full page, each page to the one before. */
export const writeFeed = ({ registry, archive, archives, items }: Feed): string => {
  const self = archive === null ? `${registry}/feed.atom` : archiveUrl(registry, archive);
  const before = archive === null ? archives - 1 : archive - 1;
  const next = archive !== null && archive + 1 < archives ? archive + 1 : null;
  return writeXml({
    feed: {
      '@xmlns': 'http://www.w3.org/2005/Atom', '@xmlns:fh': 'http://purl.org/syndication/history/1.0',
      id: `${registry}/feed.atom`,
      title: 'Evenbeam: entries frozen and withdrawn',
      updated: items[0]?.at ?? '1970-01-01T00:00:00.000Z',
      author: { name: 'Evenbeam' },
      ...(archive === null ? {} : { 'fh:archive': {} }),
      link: [
        { '@rel': 'self', '@type': 'application/atom+xml', '@href': self },
        { '@rel': 'alternate', '@type': 'text/html', '@href': `${registry}/` },
        ...(archive === null ? [] : [{ '@rel': 'current', '@type': 'application/atom+xml', '@href': `${registry}/feed.atom` }]),
        ...(before >= 0 ? [{ '@rel': 'prev-archive', '@type': 'application/atom+xml', '@href': archiveUrl(registry, before) }] : []),
        ...(next === null ? [] : [{ '@rel': 'next-archive', '@type': 'application/atom+xml', '@href': archiveUrl(registry, next) }]),
      ],
      entry: items.map(entryOf(registry)),
    },
  });
};

const sitemapNamespace = 'http://www.sitemaps.org/schemas/sitemap/0.9';

/** A sitemap: addresses with the day of their last change. */
export const writeSitemap = (pages: readonly { url: string; day?: string }[]): string => writeXml({ urlset: { '@xmlns': sitemapNamespace, url: pages.map(({ url, day }) => ({ loc: url, ...(day ? { lastmod: day } : {}) })) } });

/** The list of sitemaps. */
export const writeSitemapIndex = (urls: readonly string[]): string => writeXml({ sitemapindex: { '@xmlns': sitemapNamespace, sitemap: urls.map((loc) => ({ loc })) } });

