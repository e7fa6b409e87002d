import Negotiator from 'negotiator';
import { citationFormatNames } from '#shared/citation/format-names.ts';
import { citationFormats } from '#shared/citation/formats.ts';
import { apiUrl, type CitationRecord } from '#shared/citation/record.ts';
import { citationUrl, linksetUrl, schemaOrgUrl } from '#shared/landing/landing.ts';

/** Where an entry stands in each form other than its page, by media type. */
const elsewhere: ReadonlyMap<string, (record: CitationRecord) => string> = new Map([
  ['application/ld+json', schemaOrgUrl],
  ...citationFormatNames.map((name) => [citationFormats[name].mediaType, (record: CitationRecord) => citationUrl(record, name)] as const),
  // Names under which the same forms are asked for too.
  ['application/x-yaml', (record) => citationUrl(record, 'cff')],
  ['application/linkset+json', linksetUrl],
  ['application/json', apiUrl],
]);

/**
 * The address of the form that an Accept header prefers, or null for the page itself: for browsers, for whoever takes
 * anything, and for whoever asks for a form that there is not.
 */
export const preferredForm = (accept: string | undefined, record: CitationRecord): string | null => {
  const chosen = new Negotiator({ headers: { accept: accept ?? '*/*' } }).mediaType(['text/html', 'application/xhtml+xml', ...elsewhere.keys()]);
  return chosen === undefined ? null : (elsewhere.get(chosen)?.(record) ?? null);
};
