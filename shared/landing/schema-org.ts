import { abstractOf, citedTitle, citeUrl, entryUrl, keywordsOf, licenceUrl, nameOf, orcidUrl, pageUrl, publisher, resolves, versionUrl, type CitationRecord } from '#shared/citation/record.ts';
import type { Landing, LandingFigure, LandingFile } from './landing.ts';

const organisation = (name: string) => ({ '@type': 'Organization', name });

const person = (affiliation: string) => ({ name, orcid }: CitationRecord['contributors'][number]) => ({
  '@type': 'Person', name, affiliation: organisation(affiliation), ...(orcid ? { '@id': orcidUrl(orcid), identifier: orcidUrl(orcid) } : {}),
});

const download = (file: LandingFile) => ({
  '@type': 'DataDownload', name: file.name, description: file.description, contentUrl: file.url, encodingFormat: file.mediaType,
  ...(file.size === null ? {} : { contentSize: `${file.size} B` }), ...(file.sha256 === null ? {} : { sha256: file.sha256 }),
});

const measured = ({ name, value, low, high }: LandingFigure) => ({ '@type': 'PropertyValue', name, value, ...(low === null || high === null ? {} : { minValue: low, maxValue: high }) });

const identifiers = (record: CitationRecord) => [
  { '@type': 'PropertyValue', propertyID: 'Evenbeam accession and version', value: nameOf(record), url: pageUrl(record) },
  ...(record.doi && resolves(record.doi) ? [{ '@type': 'PropertyValue', propertyID: 'DOI', value: `doi:${record.doi}`, url: `https://doi.org/${record.doi}` }] : []),
  { '@type': 'PropertyValue', propertyID: 'SHA-256 of the canonical dataset', value: record.contentId },
];

/** A version as a schema.org Dataset in JSON-LD. A withdrawn one says so and names no file. */
export const toSchemaOrg = ({ record, files, figures }: Landing) => ({
  '@context': 'https://schema.org/',
  '@type': 'Dataset',
  '@id': citeUrl(record),
  url: pageUrl(record),
  name: citedTitle(record),
  alternateName: record.title,
  description: abstractOf(record),
  identifier: identifiers(record),
  version: String(record.version),
  creativeWorkStatus: record.state === 'frozen' ? 'Published' : record.state === 'superseded' ? 'Superseded' : 'Withdrawn',
  isAccessibleForFree: record.state !== 'withdrawn',
  ...(record.withdrawn ? { conditionsOfAccess: `Withdrawn; the data is no longer handed out. ${record.withdrawn.reason}` } : {}),
  license: licenceUrl(record.licence),
  creator: record.contributors.map(person(record.organisation)),
  creditText: `${record.organisation}`,
  publisher: { ...organisation(publisher), url: record.registry },
  includedInDataCatalog: { '@type': 'DataCatalog', name: publisher, url: record.registry },
  datePublished: record.frozenAt,
  dateCreated: record.endedAt,
  dateModified: record.withdrawn?.at ?? record.frozenAt,
  temporalCoverage: `${record.startedAt}/${record.endedAt}`,
  inLanguage: 'en',
  keywords: keywordsOf(record),
  measurementTechnique: `Linear estimate of a gate set from random circuits, method ${record.method}`,
  variableMeasured: figures.map(measured),
  ...(files.length > 0 ? { distribution: files.map(download) } : {}),
  exampleOfWork: { '@type': 'Dataset', '@id': entryUrl(record), name: `${record.accession}, all versions`, description: `Entry ${record.accession} of the Evenbeam registry; its address shows the latest version.`, license: licenceUrl(record.licence), creator: record.contributors.map(person(record.organisation)) },
  ...(record.previous ? { isBasedOn: versionUrl(record, record.previous.version) } : {}),
});
export type SchemaOrgDataset = ReturnType<typeof toSchemaOrg>;

/** JSON that cannot end the script element it stands in, whatever titles and names say. */
export const jsonForScript = (value: unknown): string => JSON.stringify(value).replace(/[<>&\u2028\u2029]/g, (c) => `\\u${c.charCodeAt(0).toString(16).padStart(4, '0')}`);
