import type { Dataset, DatasetCircuit, GateDeclaration } from '#shared/formats/types.ts';

const quarter = Math.PI / 2;

function head(register: string[], gates: GateDeclaration[], patches: Dataset['patches'], gateClass: string): Dataset {
  return {
    format: 'evenbeam.dataset', formatVersion: '1.0.0', title: 'Spring run, left half', gateClass,
    device: { provider: 'Larkspur Quantics', name: 'Meadow-5', modality: 'superconducting' },
    register, gates, patches,
    acquisition: { startedAt: '2026-05-04T08:00:00Z', endedAt: '2026-05-04T09:10:00Z', software: 'in-house 1.4' },
    contributors: [{ name: 'A. Example', orcid: '0000-0002-1825-0097' }], licence: 'CC-BY-4.0',
  };
}

const circuit = (id: string, gates: string[], counts: Record<string, number>): DatasetCircuit => ({ id, gates, shots: Object.values(counts).reduce((a, b) => a + b, 0), counts });

/** One qubit, the gates of quarter-turn-1q/1 under free labels. */
export function oneQubit(): Dataset {
  return head(['q3'], [
    { label: 'a', targets: [0], ideal: { gate: 'rx', params: [quarter] } },
    { label: 'i', targets: [0], ideal: { gate: 'id' } },
    { label: 'b', targets: [0], ideal: { gate: 'ry', params: [quarter] } },
  ], [{ qubits: [0], circuits: [circuit('c1', ['a', 'i', 'b'], { 0: 31, 1: 969 }), circuit('c2', [], { 0: 1000 }), circuit('c3', ['a', 'a'], { 1: 1000 })] }], 'quarter-turn-1q/1');
}

/** Two qubits, joint, a set of the contributor's own with a unitary written out. */
export function customPair(): Dataset {
  const s = Math.SQRT1_2;
  return head(['left', 'right'], [
    { label: 'p', targets: [0], ideal: { unitary: [[[s, 0], [0, -s]], [[0, -s], [s, 0]]] } },
    { label: 'q', targets: [1], ideal: { gate: 'ry', params: [quarter] } },
    { label: 'c', targets: [1, 0], ideal: { gate: 'cx' } },
  ], [{ qubits: [1, 0], circuits: [circuit('c1', ['p', 'q', 'c'], { '00': 400, 11: 600 }), circuit('c2', [], { '00': 990, '01': 10 })] }], 'custom');
}

/** Three qubits, chained, the gates of chained-cz-3q/1, with a patch for prediction only. */
export function chained(): Dataset {
  const locals = [0, 1, 2].flatMap((q): GateDeclaration[] => [
    { label: `i${q}`, targets: [q], ideal: { gate: 'id' } },
    { label: `x${q}`, targets: [q], ideal: { gate: 'rx', params: [quarter] } },
    { label: `y${q}`, targets: [q], ideal: { gate: 'ry', params: [quarter] } },
  ]);
  const pairs: GateDeclaration[] = [{ label: 'z01', targets: [0, 1], ideal: { gate: 'cz' } }, { label: 'z12', targets: [2, 1], ideal: { gate: 'cz' } }];
  return head(['q0', 'q1', 'q2'], [...locals, ...pairs], [
    ...[0, 1, 2].map((q) => ({ qubits: [q], circuits: [circuit(`l${q}`, [`i${q}`, `x${q}`, `y${q}`], { 0: 500, 1: 500 })] })),
    { qubits: [0, 1], circuits: [circuit('p01', ['x0', 'z01', 'y1'], { '00': 500, 11: 500 })] },
    { qubits: [2, 1], circuits: [circuit('p12', ['z12'], { '00': 500, 10: 500 })] },
    { qubits: [0, 1, 2], circuits: [circuit('w1', ['x0', 'z01', 'z12'], { '000': 500, 111: 500 })] },
  ], 'chained-cz-3q/1');
}

export const bytesOf = (value: unknown): Uint8Array => new TextEncoder().encode(JSON.stringify(value));
