import { citedTitle, citeUrl, nameOf, oneLine, publisher, yearOf, type CitationRecord } from './record.ts';

export const styleNames = ['apa', 'harvard', 'vancouver'] as const;
export type StyleName = (typeof styleNames)[number];

/** A sentence ends with one full stop, also after a name that ends with one. */
const stopped = (text: string): string => (/[.?!]$/.test(text) ? text : `${text}.`);

const listed = (names: string[], and: string): string => (names.length < 2 ? (names[0] ?? '') : `${names.slice(0, -1).join(', ')}${names.length > 2 ? ',' : ''} ${and} ${names.at(-1)}`);
/** More than twenty: the first nineteen, an ellipsis, the last. */
const apaNames = (names: string[]): string => (names.length > 20 ? `${names.slice(0, 19).join(', ')}, … ${names.at(-1)}` : listed(names, '&'));
const harvardNames = (names: string[]): string => (names.length > 3 ? `${names[0]} et al.` : listed(names, 'and'));
const vancouverNames = (names: string[]): string => (names.length > 6 ? `${names.slice(0, 6).join(', ')}, et al.` : names.join(', '));

/**
 * The record as a line for a list of references, in three common styles. Names stand as their bearers wrote them. Instead
 * of a bare "version 2" each names the accession with its version, which is what finds the entry.
 */
export const citationLine = (record: CitationRecord, style: StyleName): string => {
  const names = record.contributors.map(({ name }) => oneLine(name));
  const title = oneLine(citedTitle(record));
  const [year, url, name] = [yearOf(record), citeUrl(record), nameOf(record)];
  const gone = record.state === 'withdrawn' ? ' Withdrawn.' : '';
  if (style === 'apa') return `${stopped(apaNames(names))} (${year}). ${title} (${name}) [Data set]. ${publisher}.${gone} ${url}`;
  if (style === 'harvard') return `${harvardNames(names)} (${year}) ‘${title}’ (${name}) [Data set]. ${publisher}.${gone} Available at: ${url}.`;
  return `${stopped(vancouverNames(names))} ${title} (${name}) [data set]. ${publisher}; ${year}.${gone} Available from: ${url}`;
};
