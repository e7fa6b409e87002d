import { abstractOf, citedTitle, citeUrl, dayOf, nameOf, pageUrl, publisher, resolves } from '#shared/citation/record.ts';
import { escapeXml } from '#shared/citation/xml.ts';
import { linksetUrl, type Landing } from './landing.ts';
import { jsonForScript, toSchemaOrg } from './schema-org.ts';
import { typedLinks } from './links.ts';

const meta = (name: string, content: string): string => `<meta data-served name="${name}" content="${escapeXml(content)}">`;
const link = (rel: string, href: string, type?: string): string => `<link data-served rel="${rel}" href="${escapeXml(href)}"${type ? ` type="${escapeXml(type)}"` : ''}>`;

/** The marks of a version's page for machines, to stand in its head; `data-served` lets the client take them away when it goes on to another page. */
export const headOf = (landing: Landing): string => {
  const { record } = landing;
  return [
    `<title data-served>${escapeXml(`${record.device.name}, ${nameOf(record)}`)} | ${publisher}</title>`,
    meta('description', abstractOf(record)),
    link('canonical', pageUrl(record)),
    meta('citation_title', citedTitle(record)),
    ...record.contributors.map(({ name }) => meta('citation_author', name)),
    meta('citation_publication_date', dayOf(record.frozenAt).replaceAll('-', '/')),
    meta('citation_publisher', publisher),
    ...(record.doi && resolves(record.doi) ? [meta('citation_doi', record.doi)] : []),
    meta('citation_abstract_html_url', pageUrl(record)),
    meta('DC.identifier', citeUrl(record)),
    ...typedLinks(landing).filter(({ rel }) => rel !== 'type').map(({ rel, href, type }) => link(rel, href, type)),
    link('linkset', linksetUrl(record), 'application/linkset+json'),
    link('alternate', `${record.registry}/feed.atom`, 'application/atom+xml'),
    `<script data-served type="application/ld+json">${jsonForScript(toSchemaOrg(landing))}</script>`,
  ].join('\n    ');
};

/** Puts the marks into the page: in the place of its own title and description, at the end of its head. */
export const withHead = (page: string, head: string): string => page.replace(/<title>[^]*?<\/title>\s*/i, '').replace(/<meta name="description"[^>]*>\s*/i, '').replace(/<\/head>|(?=<body)|$/i, (end) => `  ${head}\n  ${end}`);
