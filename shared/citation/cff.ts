import { stringify } from 'yaml';
import { abstractOf, citedTitle, dayOf, keywordsOf, nameOf, orcidUrl, pageUrl, type CitationRecord } from './record.ts';

/**
 * The record as a CITATION.cff (Citation File Format 1.2.0). Authors are entities, which have one name in one piece;
 * the format's persons would need it taken apart.
 */
export const cffText = (record: CitationRecord): string =>
  stringify({
    'cff-version': '1.2.0',
    message: 'If you use this data set, please cite it as below.',
    type: 'dataset',
    title: citedTitle(record),
    authors: record.contributors.map(({ name, orcid }) => ({ name, ...(orcid ? { orcid: orcidUrl(orcid) } : {}) })),
    version: String(record.version),
    'date-released': dayOf(record.frozenAt),
    ...(record.doi ? { doi: record.doi } : {}),
    url: pageUrl(record),
    identifiers: [
      { type: 'url', value: pageUrl(record), description: `The page of ${nameOf(record)}, which does not change.` },
      { type: 'other', value: `sha256:${record.contentId}`, description: 'Content id: SHA-256 of the canonical form of the dataset.' },
    ],
    license: record.licence,
    abstract: abstractOf(record),
    keywords: keywordsOf(record),
  }, { version: '1.2', lineWidth: 0 });
