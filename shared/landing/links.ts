import { citationFormatNames } from '#shared/citation/format-names.ts';
import { citationFormats } from '#shared/citation/formats.ts';
import { apiUrl, citeUrl, entryUrl, licenceUrl, orcidUrl, pageUrl, versionUrl, type CitationRecord } from '#shared/citation/record.ts';
import { citationUrl, linksetUrl, proofUrl, schemaOrgUrl, type Landing } from './landing.ts';

/** One typed link of a landing page (RFC 8288). */
export interface TypedLink {
  rel: string;
  href: string;
  type?: string;
}

/** Where the page's content stands in other forms. */
export const descriptions = (record: CitationRecord): TypedLink[] => [
  { rel: 'describedby', href: schemaOrgUrl(record), type: 'application/ld+json' },
  ...citationFormatNames.map((name) => ({ rel: 'describedby', href: citationUrl(record, name), type: citationFormats[name].mediaType })),
  { rel: 'describedby', href: apiUrl(record), type: 'application/json' },
  { rel: 'describedby', href: proofUrl(record), type: 'application/json' },
];

const neighbours = (record: CitationRecord): TypedLink[] => [
  ...(record.previous ? [{ rel: 'predecessor-version', href: versionUrl(record, record.previous.version), type: 'text/html' }] : []),
  ...(record.next ? [{ rel: 'successor-version', href: versionUrl(record, record.next.version), type: 'text/html' }] : []),
  { rel: 'latest-version', href: entryUrl(record), type: 'text/html' },
];

/** The page's links by the signposting patterns: who, how to cite, where described, which files, which licence, what kind; and its versions (RFC 5829). */
export const typedLinks = ({ record, files }: Landing): TypedLink[] => [
  ...record.contributors.flatMap(({ orcid }) => (orcid ? [{ rel: 'author', href: orcidUrl(orcid) }] : [])),
  { rel: 'cite-as', href: citeUrl(record) },
  ...descriptions(record),
  ...files.map(({ url, mediaType }) => ({ rel: 'item', href: url, type: mediaType })),
  { rel: 'license', href: licenceUrl(record.licence) },
  { rel: 'type', href: 'https://schema.org/AboutPage' },
  { rel: 'type', href: 'https://schema.org/Dataset' },
  ...neighbours(record),
];

/** Addresses come from names of ours, ORCID iDs and SPDX ids; encoding keeps even a hostile one inside its brackets. */
const shown = ({ rel, href, type }: TypedLink): string => `<${href.replace(/[<>"\s\\]|[^\x20-\x7e]/g, encodeURIComponent)}>; rel="${rel}"${type ? `; type="${type}"` : ''}`;

/** The most bytes of links in a header; servers and proxies refuse headers much longer. */
const mostBytes = 6_000;

/** Level 1: a Link header, the set of all links always among them. Authors beyond its room stand in the linkset only. */
export const linkHeader = (landing: Landing): string => {
  const all = typedLinks(landing);
  const set = shown({ rel: 'linkset', href: linksetUrl(landing.record), type: 'application/linkset+json' });
  const others = all.filter(({ rel }) => rel !== 'author').map(shown);
  let room = mostBytes - [set, ...others].join(', ').length;
  const authors = all.filter(({ rel }) => rel === 'author').map(shown).filter((link) => (room -= link.length + 2) > 0);
  return [...authors, ...others, set].join(', ');
};

type Target = { href: string; type?: string };
export interface Linkset {
  linkset: ({ anchor: string } & Record<string, string | Target[]>)[];
}

/** Level 2: the same links and those that lead back from files and descriptions, as a linkset in JSON (RFC 9264). */
export const linksetOf = (landing: Landing): Linkset => {
  const page = pageUrl(landing.record);
  const byRel: Record<string, Target[]> = {};
  for (const { rel, ...target } of typedLinks(landing)) (byRel[rel] ??= []).push(target);
  const back: Target[] = [{ href: page, type: 'text/html' }];
  return {
    linkset: [
      { anchor: page, ...byRel },
      ...landing.files.map(({ url }) => ({ anchor: url, collection: back })),
      ...descriptions(landing.record).map(({ href }) => ({ anchor: href, describes: back })),
    ],
  };
};
