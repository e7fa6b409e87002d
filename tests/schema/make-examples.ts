/**
 * Makes the examples of schema/: one chain of files that belong together (sheet, seal, dataset, circuits, result) and two
 * smaller datasets. Counts are simulated: 0.5 % depolarisation a gate, 2 % readout error, seeds below.
 * Run: `tsx tests/schema/make-examples.ts`.
 */
import { mkdirSync, writeFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { idealProbabilities } from '#api/lib/state-vector.ts';
import { gateClassById } from '#shared/domain/gate-classes.ts';
import { contentIdOf } from '#shared/formats/canonical-json.ts';
import type { CircuitsFile, Dataset, DatasetCircuit } from '#shared/formats/types.ts';
import { estimate } from '#shared/method/estimate.ts';
import { binomial } from '#shared/random/binomial.ts';
import { drawSheet } from '#shared/runsheet/draw-sheet.ts';
import { sheetStream } from '#shared/runsheet/draw-circuits.ts';
import { openSeal } from '#shared/runsheet/seal.ts';
import { chained, customPair } from '../shared/formats/samples.ts';

const root = fileURLToPath(new URL('../../schema/', import.meta.url));

/** Lists of objects one item a line, all else on one line. */
function text(value: unknown, indent = ''): string {
  if (Array.isArray(value) && value.some((item) => typeof item === 'object' && item !== null && !Array.isArray(item))) {
    return `[\n${value.map((item) => `${indent}  ${wide(item) ? text(item, `${indent}  `) : JSON.stringify(item)}`).join(',\n')}\n${indent}]`;
  }
  if (typeof value !== 'object' || value === null || Array.isArray(value)) return JSON.stringify(value);
  return `{\n${Object.entries(value).map(([key, child]) => `${indent}  ${JSON.stringify(key)}: ${wide(child) ? text(child, `${indent}  `) : JSON.stringify(child)}`).join(',\n')}\n${indent}}`;
}
const wide = (value: unknown): boolean => JSON.stringify(value).length > 120;

function save(name: string, value: unknown): void {
  const path = `${root}${name}`;
  mkdirSync(path.slice(0, path.lastIndexOf('/')), { recursive: true });
  writeFileSync(path, `${text(value)}\n`);
}

const gateClass = gateClassById('quarter-turn-1q/1');
if (!gateClass) throw new Error('the class is shipped');
const device = { provider: 'Larkspur Quantics', name: 'Meadow-5' };
const secret = Uint8Array.from({ length: 32 }, (_, i) => (i * 37 + 11) % 256);
const { sheet } = drawSheet({ gateClass, register: ['q3'], circuits: 48, shots: 1000, seed: '5eed', issued: { id: 'RS-000123', device, drawnAt: '2026-05-01T09:00:00Z' }, newSecret: () => secret });
const noise = sheetStream('c0ffee');
const circuits = (sheet.patches[0]?.circuits ?? []).map(({ id, gates }, i): DatasetCircuit => {
  const ideal = idealProbabilities(sheet.gates, 1, gates)[0] ?? 0;
  const zeros = binomial(noise, sheet.shots, 0.5 + (ideal - 0.5) * 0.995 ** gates.length * 0.96);
  return { id, gates, shots: sheet.shots, counts: { 0: zeros, 1: sheet.shots - zeros }, block: i < 30 ? 1 : 2 };
});
const seal = openSeal(sheet, secret);
const dataset: Dataset = {
  format: 'evenbeam.dataset', formatVersion: '1.0.0', title: 'Spring run, left half', gateClass: gateClass.id, runSheet: { id: 'RS-000123', sha256: contentIdOf(sheet) },
  device: { ...device, modality: 'simulated', firmware: '2.3' }, register: ['q3'], gates: sheet.gates, patches: [{ qubits: [0], circuits }],
  acquisition: { startedAt: '2026-05-04T08:00:00Z', endedAt: '2026-05-04T09:10:00Z', software: 'in-house 1.4', notes: 'Simulated.' },
  contributors: [{ name: 'A. Example', orcid: '0000-0002-1825-0097' }], licence: 'CC-BY-4.0', extra: { refrigerator: 'B', millikelvin: 12 },
};
const predict: CircuitsFile = { format: 'evenbeam.circuits', formatVersion: '1.0.0', circuits: [{ id: 't1', qubits: [0], gates: ['rx', 'rx'] }, { id: 't2', qubits: [0], gates: ['ry', 'id', 'rx', 'ry', 'ry'] }] };

save('run-sheet/examples/one-qubit.json', sheet);
save('seal/examples/one-qubit.json', seal);
save('dataset/examples/one-qubit.json', dataset);
save('dataset/examples/custom-pair.json', { ...customPair(), title: 'A pair with gates of its own', device: { provider: 'Saltmarsh Atoms', name: 'Heron-1', modality: 'neutral-atom' } });
save('dataset/examples/chained.json', { ...chained(), title: 'Three qubits in a chain', device: { provider: 'Fellside Ion Works', name: 'Tarn-2', modality: 'trapped-ion' } });
save('circuits/examples/one-qubit.json', predict);
save('result/examples/one-qubit.json', estimate({ dataset, contentId: contentIdOf(dataset), gateClass, seal, predict, replicates: 200 }).result);
