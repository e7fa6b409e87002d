import { abstractOf, citedTitle, keywordsOf, nameOf, pageUrl, publisher, resolves, type CitationRecord } from './record.ts';

/** An item of CSL-JSON (Citation Style Language 1.0.2), as reference managers take it. */
export interface CslItem {
  id: string;
  type: 'dataset';
  title: string;
  author: { literal: string }[];
  publisher: string;
  issued: { 'date-parts': [[number, number, number]] };
  version: string;
  number: string;
  DOI?: string;
  URL: string;
  abstract: string;
  keyword: string;
  source: string;
  note: string;
  status?: 'withdrawn';
}

const dateParts = (instant: string): [[number, number, number]] => [[Number(instant.slice(0, 4)), Number(instant.slice(5, 7)), Number(instant.slice(8, 10))]];

export const licenceNote = ({ licence, contentId, doi }: CitationRecord): string =>
  `Licence: ${licence}. Content id: ${contentId}.${doi && !resolves(doi) ? ' The DOI is of a local stand-in and does not resolve.' : ''}`;

/** The record as CSL-JSON. */
export const toCsl = (record: CitationRecord): CslItem => ({
  id: nameOf(record),
  type: 'dataset',
  title: citedTitle(record),
  author: record.contributors.map(({ name }) => ({ literal: name })),
  publisher,
  issued: { 'date-parts': dateParts(record.frozenAt) },
  version: String(record.version),
  number: nameOf(record),
  ...(record.doi ? { DOI: record.doi } : {}),
  URL: pageUrl(record),
  abstract: abstractOf(record),
  keyword: keywordsOf(record).join(', '),
  source: publisher,
  note: licenceNote(record),
  ...(record.state === 'withdrawn' ? { status: 'withdrawn' as const } : {}),
});

/** A CSL-JSON file: a list of one item. */
export const cslText = (record: CitationRecord): string => `${JSON.stringify([toCsl(record)], null, 2)}\n`;
