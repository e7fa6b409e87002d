import type { CitationRecord } from '#shared/citation/record.ts';

/** An ordinary record, with whatever a test wants otherwise. */
export const citationRecord = (more: Partial<CitationRecord> = {}): CitationRecord => ({
  accession: 'EVB-000042', version: 2, state: 'frozen', title: 'Spring run, left half',
  contributors: [{ name: 'A. Example', orcid: '0000-0002-1825-0097' }, { name: 'Berit Sample', orcid: null }], organisation: 'Larkspur Quantics',
  device: { name: 'Meadow-5', provider: 'Larkspur Quantics', modality: 'superconducting' }, gateClass: { id: 'quarter-turn-1q/1', title: 'Quarter turns on one qubit' },
  register: ['q3'], method: 'M1', frozenAt: '2026-05-19T10:00:00.000Z', startedAt: '2026-05-04T08:00:00.000Z', endedAt: '2026-05-04T09:10:00.000Z', licence: 'CC-BY-4.0',
  contentId: '7d1f0c4be29a6533f8b1907c5ad24e61b03c98fe4472d615a0e97b3c18f2d6a9', bytes: 48_211, registry: 'https://evenbeam.example', doi: '10.1234/evb-000042.2',
  previous: { version: 1, doi: '10.1234/evb-000042.1' }, next: null, withdrawn: null, ...more,
});
