import { describe, expect, test } from 'vitest';
import { gateClassById } from '#shared/domain/gate-classes.ts';
import { readCircuits } from '#shared/formats/read-circuits.ts';
import { readRunSheet } from '#shared/formats/read-run-sheet.ts';
import type { CircuitsFile, RunSheet } from '#shared/formats/types.ts';
import { drawSheet } from '#shared/runsheet/draw-sheet.ts';
import { bytesOf, chained, customPair, oneQubit } from './samples.ts';

const circuitsFile = (circuits: unknown): unknown => ({ format: 'evenbeam.circuits', formatVersion: '1.0.0', circuits });

describe('circuits to predict', () => {
  test.each<[string, unknown, ReturnType<typeof oneQubit>]>([
    ['the patch as it stands', [{ id: 't1', qubits: [1, 0], gates: ['p', 'c'] }, { id: 't2', qubits: [1, 0], gates: [] }], customPair()],
    ['any qubits of a chained register, in any order', [{ id: 't1', qubits: [2, 0], gates: ['x2', 'y0'] }, { id: 't2', qubits: [1, 2, 0], gates: ['z12', 'z01'] }], chained()],
  ])('%s', (_, circuits, dataset) => {
    const reading = readCircuits(bytesOf(circuitsFile(circuits)), dataset);
    expect(reading).toEqual({ ok: true, circuits: circuitsFile(circuits) as CircuitsFile });
  });

  test.each<[string, unknown, ReturnType<typeof oneQubit>, string, string]>([
    ['no circuits', circuitsFile([]), oneQubit(), '/circuits', 'at least 1 item'],
    ['a dataset in its place', oneQubit(), oneQubit(), '/format', '"evenbeam.circuits"'],
    ['shots, which belong to datasets', circuitsFile([{ id: 't', qubits: [0], gates: [], shots: 5 }]), oneQubit(), '/circuits/0/shots', 'no property "shots"'],
    ['an id twice', circuitsFile([{ id: 't', qubits: [0], gates: [] }, { id: 't', qubits: [0], gates: ['a'] }]), oneQubit(), '/circuits/1/id', 'first at /circuits/0'],
    ['an unknown label', circuitsFile([{ id: 't', qubits: [0], gates: ['a', 'q'] }]), oneQubit(), '/circuits/0/gates/1', '"q"'],
    ['the qubits of a joint patch in another order', circuitsFile([{ id: 't', qubits: [0, 1], gates: [] }]), customPair(), '/circuits/0/qubits', '[1, 0] in this order; they are [0, 1]'],
    ['a qubit outside a chained register', circuitsFile([{ id: 't', qubits: [0, 3], gates: [] }]), chained(), '/circuits/0/qubits/1', 'no index of the register'],
    ['a gate outside the circuit’s qubits', circuitsFile([{ id: 't', qubits: [0, 2], gates: ['z01'] }]), chained(), '/circuits/0/gates/0', 'acts on qubits 0, 1'],
  ])('%s is refused', (_, file, dataset, pointer, words) => {
    const reading = readCircuits(bytesOf(file), dataset);
    const errors = reading.ok ? [] : reading.errors;
    expect(errors.find((error) => error.pointer === pointer && error.message.includes(words)), JSON.stringify(errors)).toBeDefined();
  });
});

describe('run sheets', () => {
  const gateClass = gateClassById('half-turn-1q/1');
  if (!gateClass) throw new Error('the class is shipped');
  const sheet = drawSheet({ gateClass, register: ['q7'], circuits: 20, shots: 100, seed: '11', issued: { id: 'RS-000007', device: { provider: 'Pellmere Instruments', name: 'Spin-1' }, drawnAt: '2026-05-01T09:00:00Z' }, newSecret: () => new Uint8Array(32).fill(1) }).sheet;

  test.each<[string, (copy: RunSheet) => void, string, string]>([
    ['more sealed than there are', (copy) => { if (copy.patches[0]) copy.patches[0].sealed = 99; }, '/patches/0/sealed', 'the patch has 25'],
    ['sealed without a commitment', (copy) => { copy.sealSha256 = null; }, '/patches/0/sealed', 'no sealSha256'],
    ['gates of another class', (copy) => { copy.gates[0] = { label: 'x', targets: [0], ideal: { gate: 'h' } }; }, '/gates/0', 'not one of the gates'],
    ['an id twice', (copy) => { const c = copy.patches[0]?.circuits; if (c?.[1]) c[1].id = 'c0001'; }, '/patches/0/circuits/1/id', 'used twice'],
    ['an unknown label', (copy) => { const c = copy.patches[0]?.circuits; if (c?.[2]) c[2].gates = ['w']; }, '/patches/0/circuits/2/gates/0', '"w"'],
    ['a register too large', (copy) => { copy.register.push('q8'); }, '/register', 'register of 1; this one has 2'],
    ['a seed that is no hex', (copy) => { copy.seed = 'xyz'; }, '/seed', 'hexadecimal'],
    ['counts, which belong to datasets', (copy) => { Object.assign(copy.patches[0]?.circuits[0] ?? {}, { counts: {} }); }, '/patches/0/circuits/0/counts', 'no property "counts"'],
  ])('%s is refused', (_, change, pointer, words) => {
    const copy = structuredClone(sheet);
    change(copy);
    const reading = readRunSheet(bytesOf(copy));
    const errors = reading.ok ? [] : reading.errors;
    expect(errors.find((error) => error.pointer === pointer && error.message.includes(words)), JSON.stringify(errors)).toBeDefined();
  });
});
