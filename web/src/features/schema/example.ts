import type { Dataset } from '#shared/formats/types.ts';

/** A whole small dataset: valid, invented, and far below the floor of a board. */
export const exampleDataset: Dataset = {
  format: 'evenbeam.dataset',
  formatVersion: '1.0.0',
  title: 'Four circuits to try the format',
  gateClass: 'custom',
  runSheet: null,
  device: { provider: 'Larkspur Quantics', name: 'Meadow-5', modality: 'superconducting', firmware: '2.3' },
  register: ['q3'],
  gates: [
    { label: 'a', targets: [0], ideal: { gate: 'rx', params: [1.5707963267948966] } },
    { label: 'i', targets: [0], ideal: { gate: 'id' } },
  ],
  patches: [
    {
      qubits: [0],
      circuits: [
        { id: 'c0001', gates: [], shots: 1000, counts: { '0': 994, '1': 6 } },
        { id: 'c0002', gates: ['a'], shots: 1000, counts: { '0': 512, '1': 488 } },
        { id: 'c0003', gates: ['a', 'a'], shots: 1000, counts: { '0': 12, '1': 988 } },
        { id: 'c0004', gates: ['a', 'i', 'a', 'i'], shots: 1000, counts: { '0': 17, '1': 983 } },
      ],
    },
  ],
  acquisition: { startedAt: '2026-05-04T08:00:00Z', endedAt: '2026-05-04T08:01:00Z', software: 'in-house 1.4' },
  contributors: [{ name: 'A. Example' }],
  licence: 'CC-BY-4.0',
};
