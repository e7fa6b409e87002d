import { toDatacite } from './datacite.ts';
import type { CitationRecord } from './record.ts';
import { writeXml } from './xml.ts';

/** The record by the DataCite metadata schema 4.6 as XML. Without a DOI the identifier is the version's page. */
export const dataciteXml = (record: CitationRecord): string => {
  const d = toDatacite(record);
  return writeXml({
    resource: {
      '@xmlns': 'http://datacite.org/schema/kernel-4',
      '@xmlns:xsi': 'http://www.w3.org/2001/XMLSchema-instance',
      '@xsi:schemaLocation': 'http://datacite.org/schema/kernel-4 https://schema.datacite.org/meta/kernel-4.6/metadata.xsd',
      identifier: d.doi ? { '@identifierType': 'DOI', '#': d.doi } : { '@identifierType': 'URL', '#': d.url },
      creators: {
        creator: d.creators.map((c) => ({
          creatorName: { '@nameType': c.nameType, '#': c.name },
          nameIdentifier: c.nameIdentifiers.map((n) => ({ '@nameIdentifierScheme': n.nameIdentifierScheme, '@schemeURI': n.schemeUri, '#': n.nameIdentifier })),
          affiliation: c.affiliation.map((a) => a.name),
        })),
      },
      titles: { title: d.titles.map((t) => ({ '@xml:lang': t.lang, '#': t.title })) },
      publisher: d.publisher.name,
      publicationYear: d.publicationYear,
      resourceType: { '@resourceTypeGeneral': d.types.resourceTypeGeneral, '#': d.types.resourceType },
      subjects: { subject: d.subjects.map((s) => s.subject) },
      contributors: { contributor: d.contributors.map((c) => ({ '@contributorType': c.contributorType, contributorName: { '@nameType': c.nameType, '#': c.name } })) },
      dates: { date: d.dates.map((x) => ({ '@dateType': x.dateType, '#': x.date })) },
      language: d.language,
      alternateIdentifiers: { alternateIdentifier: d.alternateIdentifiers.map((a) => ({ '@alternateIdentifierType': a.alternateIdentifierType, '#': a.alternateIdentifier })) },
      relatedIdentifiers: { relatedIdentifier: d.relatedIdentifiers.map((r) => ({ '@relatedIdentifierType': r.relatedIdentifierType, '@relationType': r.relationType, '#': r.relatedIdentifier })) },
      sizes: { size: d.sizes },
      formats: { format: d.formats },
      version: d.version,
      rightsList: { rights: d.rightsList.map((r) => ({ '@rightsURI': r.rightsUri, '@rightsIdentifier': r.rightsIdentifier, '@rightsIdentifierScheme': r.rightsIdentifierScheme, '@schemeURI': r.schemeUri, '#': r.rights })) },
      descriptions: { description: d.descriptions.map((x) => ({ '@descriptionType': x.descriptionType, '#': x.description })) },
    },
  });
};
