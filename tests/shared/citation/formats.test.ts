import { Cite } from '@citation-js/core';
import '@citation-js/plugin-csl';
import { SaxesParser } from 'saxes';
import { describe, expect, it } from 'vitest';
import { parse } from 'yaml';
import { bibtexText } from '#shared/citation/bibtex.ts';
import { cffText } from '#shared/citation/cff.ts';
import { toCsl } from '#shared/citation/csl.ts';
import { dataciteXml } from '#shared/citation/datacite-xml.ts';
import { toDatacite } from '#shared/citation/datacite.ts';
import { licenceUrl } from '#shared/citation/record.ts';
import { risText } from '#shared/citation/ris.ts';
import { citationLine } from '#shared/citation/styles.ts';
import { citationRecord } from '#tests/support/citation-records.ts';

const people = (count: number) => Array.from({ length: count }, (_, i) => ({ name: `P${i} Name`, orcid: null }));

/** By citeproc with the styles' own templates; ours name the accession where they say "Version 2", and the kind of work. */
const byCiteproc = (record = citationRecord(), template: 'apa' | 'harvard1' | 'vancouver'): string => new Cite(toCsl(record)).format('bibliography', { template, format: 'text', lang: template === 'apa' ? 'en-US' : 'en-GB' }).trim();

describe('lines for a list of references', () => {
  it.each([1, 2, 3, 4, 6, 7, 8, 20, 21, 25])('APA: %i names are joined as citeproc joins them, with the accession for the version', (count) => {
    const record = citationRecord({ contributors: people(count) });
    const other = byCiteproc(record, 'apa').replace('(EVB-000042.2; Version 2) [Dataset]', '(EVB-000042.2) [Data set]');
    expect(citationLine(record, 'apa')).toBe(other);
  });

  it.each([1, 2, 3, 4, 6, 7])('Harvard and Vancouver: %i names are joined as citeproc joins them', (count) => {
    const record = citationRecord({ contributors: people(count) });
    const names = (line: string, end: string): string => line.slice(0, line.indexOf(end));
    expect(names(citationLine(record, 'harvard'), ' (2026)')).toBe(names(byCiteproc(record, 'harvard1'), ' (2026)'));
    expect(names(citationLine(record, 'vancouver'), ' Meadow-5')).toBe(names(byCiteproc(record, 'vancouver').replace(/^1\. /, ''), ' Meadow-5'));
  });

  it('end with the DOI where it resolves, with the page of the version where there is none or a local one', () => {
    expect(citationLine(citationRecord(), 'apa')).toMatch(/ https:\/\/doi\.org\/10\.1234\/evb-000042\.2$/);
    for (const doi of [null, '10.5072/evb-000042.2']) expect(citationLine(citationRecord({ doi }), 'apa')).toMatch(/ https:\/\/evenbeam\.example\/entries\/EVB-000042\/v\/2$/);
  });

  it('say that an entry was withdrawn', () => {
    const gone = citationRecord({ state: 'withdrawn', withdrawn: { at: '2026-06-01T00:00:00.000Z', reason: 'Wrong qubit.' } });
    for (const style of ['apa', 'harvard', 'vancouver'] as const) expect(citationLine(gone, style)).toContain(' Withdrawn. ');
  });
});

describe('DataCite metadata', () => {
  it('has what schema 4.6 requires and recommends, a Dataset, by person with ORCID and affiliation', () => {
    const d = toDatacite(citationRecord());
    expect(d).toMatchObject({ doi: '10.1234/evb-000042.2', publisher: { name: 'Evenbeam' }, publicationYear: '2026', types: { resourceTypeGeneral: 'Dataset' }, version: '2', rightsList: [{ rightsIdentifier: 'CC-BY-4.0', rightsIdentifierScheme: 'SPDX' }] });
    expect(d.creators[0]).toMatchObject({ name: 'A. Example', nameIdentifiers: [{ nameIdentifier: 'https://orcid.org/0000-0002-1825-0097', nameIdentifierScheme: 'ORCID' }], affiliation: [{ name: 'Larkspur Quantics' }] });
    expect(d.creators[1]?.nameIdentifiers).toEqual([]);
  });

  it('relates a version to the one before, the one after and the entry as a whole', () => {
    const relationsOf = (more: Parameters<typeof citationRecord>[0]) => toDatacite(citationRecord(more)).relatedIdentifiers.map((r) => `${r.relationType} ${r.relatedIdentifierType} ${r.relatedIdentifier}`);
    expect(relationsOf({})).toEqual(['IsVersionOf URL https://evenbeam.example/entries/EVB-000042', 'IsNewVersionOf DOI 10.1234/evb-000042.1']);
    expect(relationsOf({ version: 1, previous: null, next: { version: 2, doi: null } })).toEqual(['IsVersionOf URL https://evenbeam.example/entries/EVB-000042', 'IsPreviousVersionOf URL https://evenbeam.example/entries/EVB-000042/v/2']);
  });

  it('is the same in XML: identifier, creators, titles, relations, in the namespace kernel-4', () => {
    const seen: string[] = [];
    const parser = new SaxesParser({ xmlns: true });
    parser.on('opentag', (tag) => seen.push(`${tag.uri === 'http://datacite.org/schema/kernel-4' ? '' : '!'}${tag.local}`));
    parser.on('error', (fault) => { throw fault; });
    const xml = dataciteXml(citationRecord());
    parser.write(xml).close();
    for (const name of ['resource', 'identifier', 'creatorName', 'nameIdentifier', 'affiliation', 'title', 'publisher', 'publicationYear', 'resourceType', 'relatedIdentifier', 'rights', 'description']) expect(seen).toContain(name);
    expect(seen.filter((name) => name.startsWith('!'))).toEqual([]);
    expect(xml).toContain('<identifier identifierType="DOI">10.1234/evb-000042.2</identifier>');
    expect(xml).toContain('<relatedIdentifier relatedIdentifierType="DOI" relationType="IsNewVersionOf">10.1234/evb-000042.1</relatedIdentifier>');
  });
});

describe('other formats', () => {
  it('CFF 1.2.0 has its required members, people by one name each, dates and DOI as text', () => {
    expect(parse(cffText(citationRecord()))).toMatchObject({
      'cff-version': '1.2.0', message: expect.any(String) as string, type: 'dataset', version: '2', 'date-released': '2026-05-19', doi: '10.1234/evb-000042.2', license: 'CC-BY-4.0',
      authors: [{ name: 'A. Example', orcid: 'https://orcid.org/0000-0002-1825-0097' }, { name: 'Berit Sample' }],
    });
  });

  it('name the trial DOI, and say that it does not resolve', () => {
    const record = citationRecord({ doi: '10.5072/evb-000042.2' });
    for (const text of [bibtexText(record), risText(record)]) expect(text).toMatch(/10\.5072\/evb-000042\.2[^]*does not resolve/);
  });

  it('leave the DOI out where none is registered', () => {
    const record = citationRecord({ doi: null, previous: null });
    for (const text of [bibtexText(record), risText(record), cffText(record), JSON.stringify(toCsl(record)), JSON.stringify(toDatacite(record)), dataciteXml(record)]) expect(text).not.toMatch(/\bdoi\b/i);
  });

  it('give licences their own addresses', () => {
    expect(['CC-BY-4.0', 'CC-BY-SA-3.0', 'CC0-1.0', 'ODbL-1.0'].map(licenceUrl)).toEqual(['https://creativecommons.org/licenses/by/4.0/', 'https://creativecommons.org/licenses/by-sa/3.0/', 'https://creativecommons.org/publicdomain/zero/1.0/', 'https://spdx.org/licenses/ODbL-1.0.html']);
  });
});
