import { describe, expect, it } from 'vitest';
import type { Dataset } from '#shared/formats/types.ts';
import { summarise } from '#web/lib/dataset-summary.ts';

const dataset: Dataset = {
  format: 'evenbeam.dataset', formatVersion: '1.0.0', title: 'Spring run', gateClass: 'quarter-turn-1q/1', runSheet: { id: 'RS-000123', sha256: 'a'.repeat(64) },
  device: { provider: 'Larkspur Quantics', name: 'Meadow-5', modality: 'superconducting' }, register: ['q3'],
  gates: [{ label: 'a', targets: [0], ideal: { gate: 'rx', params: [1.5707963267948966] } }],
  patches: [{ qubits: [0], circuits: [
    { id: 'c1', gates: [], shots: 500, counts: { 0: 500 }, block: 1 }, { id: 'c2', gates: ['a', 'a', 'a'], shots: 1000, counts: { 0: 1, 1: 999 }, block: 2 }, { id: 'c3', gates: ['a'], shots: 1000, counts: { 1: 1000 }, block: 2 }] }],
  acquisition: { startedAt: '2026-05-04T08:00:00Z', endedAt: '2026-05-04T09:10:00Z', software: 'in-house 1.4' }, contributors: [{ name: 'A. Example' }], licence: 'CC-BY-4.0',
};

describe('what was read from a file', () => {
  it('counts circuits, shots, lengths and blocks', () => {
    expect(summarise(dataset)).toMatchObject({ circuits: 3, shots: 2500, lengths: { shortest: 0, longest: 3 }, blocks: 2, runSheet: 'RS-000123' });
  });
  it('stays finite for a file without circuits', () => {
    expect(summarise({ ...dataset, runSheet: null, patches: [{ qubits: [0], circuits: [] }] })).toMatchObject({ circuits: 0, shots: 0, lengths: { shortest: 0, longest: 0 }, blocks: 0, runSheet: null });
  });
});
