import { abstractOf, citedTitle, dayOf, entryUrl, keywordsOf, licenceUrl, nameOf, orcidUrl, pageUrl, publisher, versionUrl, yearOf, type CitationRecord, type VersionRef } from './record.ts';

type Relation = 'IsNewVersionOf' | 'IsPreviousVersionOf' | 'IsVersionOf';

/** A version's address as the agency takes it: its DOI, or its page where it has none. */
const related = (relationType: Relation, url: string, doi: string | null) =>
  doi ? { relatedIdentifier: doi, relatedIdentifierType: 'DOI' as const, relationType } : { relatedIdentifier: url, relatedIdentifierType: 'URL' as const, relationType };

const relations = (record: CitationRecord) => {
  const of = (relation: Relation, other: VersionRef | null) => (other ? [related(relation, versionUrl(record, other.version), other.doi)] : []);
  return [related('IsVersionOf', entryUrl(record), null), ...of('IsNewVersionOf', record.previous), ...of('IsPreviousVersionOf', record.next)];
};

const creator = (organisation: string) => ({ name, orcid }: CitationRecord['contributors'][number]) => ({
  name,
  nameType: 'Personal' as const,
  nameIdentifiers: orcid ? [{ nameIdentifier: orcidUrl(orcid), nameIdentifierScheme: 'ORCID', schemeUri: 'https://orcid.org' }] : [],
  affiliation: [{ name: organisation }],
});

/** The record by the DataCite metadata schema 4.6, in the JSON form of the agency's interface. */
export const toDatacite = (record: CitationRecord) => ({
  ...(record.doi ? { doi: record.doi } : {}),
  url: pageUrl(record),
  types: { resourceTypeGeneral: 'Dataset' as const, resourceType: 'Circuit counts and estimated gate figures' },
  creators: record.contributors.map(creator(record.organisation)),
  titles: [{ title: citedTitle(record), lang: 'en' }],
  publisher: { name: publisher },
  publicationYear: yearOf(record),
  subjects: keywordsOf(record).map((subject) => ({ subject })),
  contributors: [{ name: record.organisation, nameType: 'Organizational' as const, contributorType: 'DataCollector' as const }],
  dates: [
    { date: dayOf(record.frozenAt), dateType: 'Available' },
    { date: `${record.startedAt}/${record.endedAt}`, dateType: 'Collected' },
    ...(record.withdrawn ? [{ date: dayOf(record.withdrawn.at), dateType: 'Withdrawn' }] : []),
  ],
  language: 'en',
  alternateIdentifiers: [
    { alternateIdentifier: nameOf(record), alternateIdentifierType: 'Evenbeam accession and version' },
    { alternateIdentifier: record.contentId, alternateIdentifierType: 'SHA-256 of the canonical dataset' },
  ],
  relatedIdentifiers: relations(record),
  sizes: [`${record.bytes} bytes`],
  formats: ['application/json'],
  version: String(record.version),
  rightsList: [{ rights: record.licence, rightsUri: licenceUrl(record.licence), rightsIdentifier: record.licence, rightsIdentifierScheme: 'SPDX', schemeUri: 'https://spdx.org/licenses/' }],
  descriptions: [{ description: abstractOf(record), descriptionType: 'Abstract' }],
  schemaVersion: 'http://datacite.org/schema/kernel-4',
});
export type DataciteRecord = ReturnType<typeof toDatacite>;

export const dataciteText = (record: CitationRecord): string => `${JSON.stringify(toDatacite(record), null, 2)}\n`;
