import { readFileSync } from 'node:fs';
import { expect, test } from 'vitest';
import { contentIdOf } from '#shared/formats/canonical-json.ts';
import type { Dataset, RunSheet } from '#shared/formats/types.ts';
import { matchSheet } from '#shared/runsheet/match-sheet.ts';

const read = <T>(path: string): T => JSON.parse(readFileSync(new URL(`../../../schema/${path}`, import.meta.url), 'utf8')) as T;
const sheet = read<RunSheet>('run-sheet/examples/one-qubit.json');
const dataset = read<Dataset>('dataset/examples/one-qubit.json');

test('labels, order of gates and order of circuits are free', () => {
  const renamed = structuredClone(dataset);
  const names: Record<string, string> = { id: 'rx', rx: 'ry', ry: 'wait' };
  renamed.gates = renamed.gates.map((gate) => ({ ...gate, label: names[gate.label] ?? '' })).reverse();
  for (const patch of renamed.patches) patch.circuits = patch.circuits.map((circuit) => ({ ...circuit, gates: circuit.gates.map((label) => names[label] ?? '') })).reverse();
  expect(matchSheet(renamed, sheet)).toEqual([]);
});

type Change = (copy: Dataset) => void;
const first = (copy: Dataset) => copy.patches[0]?.circuits[0] ?? { id: '', gates: [], shots: 0, counts: {} };

test.each<[string, Change, string, string]>([
  ['another number', (copy) => { copy.runSheet = { id: 'RS-000124', sha256: contentIdOf(sheet) }; }, '/runSheet', '"RS-000124"'],
  ['no run sheet', (copy) => { delete copy.runSheet; }, '/runSheet', 'absent'],
  ['another digest', (copy) => { copy.runSheet = { id: 'RS-000123', sha256: '0'.repeat(64) }; }, '/runSheet/sha256', contentIdOf(sheet)],
  ['another class', (copy) => { copy.gateClass = 'custom'; }, '/gateClass', '"custom"'],
  ['another device', (copy) => { copy.device.name = 'Meadow-6'; }, '/device', '"Meadow-6"'],
  ['another qubit', (copy) => { copy.register = ['q4']; }, '/register', '"q3"'],
  ['a gate that does something else', (copy) => { copy.gates[1] = { label: 'rx', targets: [0], ideal: { gate: 'x' } }; }, '/gates/1', 'not on the sheet'],
  ['a circuit with another gate', (copy) => { first(copy).gates[0] = first(copy).gates[0] === 'id' ? 'rx' : 'id'; }, '/patches/0/circuits/0/gates', 'not those of the sheet'],
  ['a circuit cut short', (copy) => { first(copy).gates.pop(); }, '/patches/0/circuits/0/gates', 'not those of the sheet'],
  ['other shots', (copy) => { first(copy).shots = 999; }, '/patches/0/circuits/0/shots', 'asks for 1000 shots'],
  ['a circuit of its own', (copy) => { first(copy).id = 'mine'; }, '/patches/0/circuits/0/id', '"mine"'],
  ['a circuit left out', (copy) => { copy.patches[0]?.circuits.splice(3, 1); }, '/patches/0/circuits', '1 circuit of the sheet is missing: "c0004"'],
  ['a patch too many', (copy) => { copy.patches.push({ qubits: [0, 1], circuits: [] }); }, '/patches/1', 'no patch of these qubits'],
  ['a patch left out', (copy) => { copy.patches = []; }, '/patches', 'patch of qubits 0 is missing'],
])('%s is told', (_, change, pointer, words) => {
  const copy = structuredClone(dataset);
  change(copy);
  const errors = matchSheet(copy, sheet);
  expect(errors.find((error) => error.pointer === pointer && error.message.includes(words)), JSON.stringify(errors)).toBeDefined();
});

test('a sheet that was not run at all gives at most fifty sentences', () => {
  const copy = structuredClone(dataset);
  copy.patches[0]?.circuits.push(...Array.from({ length: 100 }, (_, i) => ({ id: `own${i}`, gates: [], shots: 1, counts: { 0: 1 } })));
  expect(matchSheet(copy, sheet)).toHaveLength(50);
});
