import { abstractOf, citedTitle, dayOf, keywordsOf, licenceUrl, nameOf, orcidUrl, pageUrl, publisher, type CitationRecord } from '#shared/citation/record.ts';

/** A file of the archive. */
export interface CrateFile {
  name: string;
  sha256: string;
  /** Bytes. */
  size: number;
}

const about: Readonly<Record<string, { mediaType: string; description: string }>> = {
  'entry.json': { mediaType: 'application/json', description: 'The facts of the entry that never change.' },
  'dataset.json': { mediaType: 'application/json', description: 'The dataset exactly as it was submitted.' },
  'run-sheet.json': { mediaType: 'application/json', description: 'The circuits as they were drawn, with the digest of the seal.' },
  'seal.json': { mediaType: 'application/json', description: 'The revealed secret that chose the sealed circuits.' },
  'result.json': { mediaType: 'application/json', description: 'Every figure with its intervals, in RFC 8785 form.' },
  'replicates.f64': { mediaType: 'application/octet-stream', description: 'Bootstrap replicates of every figure, float64 little-endian.' },
  'proof.json': { mediaType: 'application/json', description: 'The proof that the entry is in the log of the registry.' },
};

const conformsTo = 'https://w3id.org/ro/crate/1.1';
export const crateFileName = 'ro-crate-metadata.json';

/**
 * An entry's archive as an RO-Crate 1.1: metadata of the root data set, its files and its people. What changes after the freezing
 * (state, DOI, later versions) stays out, so that the same entry gives the same bytes for ever.
 */
export const roCrate = (record: CitationRecord, files: readonly CrateFile[]) => {
  const fixed: CitationRecord = { ...record, doi: null, previous: null, next: null, withdrawn: null, state: 'frozen' };
  const people = fixed.contributors.map(({ name, orcid }, i) => ({ '@id': orcid ? orcidUrl(orcid) : `#contributor-${i + 1}`, '@type': 'Person', name, affiliation: { '@id': '#organisation' } }));
  const ids = [...new Set(people.map((p) => p['@id']))];
  return {
    '@context': `${conformsTo}/context`,
    '@graph': [
      { '@id': crateFileName, '@type': 'CreativeWork', conformsTo: { '@id': conformsTo }, about: { '@id': './' } },
      {
        '@id': './', '@type': 'Dataset', identifier: nameOf(fixed), url: pageUrl(fixed), name: citedTitle(fixed), description: abstractOf(fixed), version: String(fixed.version),
        datePublished: dayOf(fixed.frozenAt), temporalCoverage: `${fixed.startedAt}/${fixed.endedAt}`, license: { '@id': licenceUrl(fixed.licence) }, author: ids.map((id) => ({ '@id': id })),
        publisher: { '@id': '#publisher' }, keywords: keywordsOf(fixed).join(', '), hasPart: files.map(({ name }) => ({ '@id': name })),
      },
      ...files.map(({ name, sha256, size }) => ({ '@id': name, '@type': 'File', name, description: about[name]?.description ?? name, encodingFormat: about[name]?.mediaType ?? 'application/octet-stream', contentSize: String(size), sha256 })),
      // One node an identifier: two names with one ORCID iD are one person.
      ...ids.flatMap((id) => people.filter((person) => person['@id'] === id).slice(0, 1)),
      { '@id': '#organisation', '@type': 'Organization', name: fixed.organisation },
      { '@id': '#publisher', '@type': 'Organization', name: publisher, url: fixed.registry },
      { '@id': licenceUrl(fixed.licence), '@type': 'CreativeWork', name: fixed.licence, identifier: fixed.licence },
    ],
  };
};

export const roCrateText = (record: CitationRecord, files: readonly CrateFile[]): string => `${JSON.stringify(roCrate(record, files), null, 2)}\n`;
