import { readdirSync, readFileSync } from 'node:fs';
import { describe, expect, test } from 'vitest';
import { validatorModule } from '#api/lib/validator-source.ts';
import { patternWords } from '#shared/formats/schema-sentences.ts';
import { standardGates } from '#shared/quantum/standard-gates.ts';

const folder = new URL('../../schema/', import.meta.url);
const names = ['dataset', 'circuits', 'run-sheet', 'seal', 'gate-class', 'result'];

type Node = Record<string, unknown>;
const read = (name: string): Node => JSON.parse(readFileSync(new URL(`${name}/1.0.0.schema.json`, folder), 'utf8')) as Node;

/** Every schema object inside a schema, with its place; members of `properties` and `$defs` are names, not keywords. */
function nodesOf(node: Node, place: string): [string, Node][] {
  const found: [string, Node][] = [[place, node]];
  for (const [key, value] of Object.entries(node)) {
    if (typeof value !== 'object' || value === null || Array.isArray(value)) continue;
    if (key === 'properties' || key === '$defs') for (const [name, child] of Object.entries(value as Record<string, unknown>)) {
      if (typeof child === 'object') found.push(...nodesOf(child as Node, `${place}/${key}/${name}`));
    }
    else found.push(...nodesOf(value as Node, `${place}/${key}`));
  }
  return found;
}

const all = names.flatMap((name) => nodesOf(read(name), name));

test('every format has one schema, under its own address', () => {
  // Beside the formats lie the conformance vectors.
  expect(readdirSync(folder).filter((name) => !name.includes('.') && name !== 'conformance').sort()).toEqual([...names].sort());
  for (const name of names) expect(read(name)).toMatchObject({ $schema: 'https://json-schema.org/draft/2020-12/schema', $id: `https://evenbeam.example/schema/${name}/1.0.0.schema.json` });
});

describe.each(all.filter(([, node]) => node.properties !== undefined && node.required !== undefined && node.if === undefined && node.title !== undefined))('%s', (_, node) => {
  test('refuses unknown properties, asks only for known ones, and has a title and a description', () => {
    expect(node.additionalProperties).toBe(false);
    expect(Object.keys(node.properties as Node)).toEqual(expect.arrayContaining(node.required as string[]));
    expect(node.title).toMatch(/\S/);
    expect(node.description).toMatch(/\S/);
  });
});

test('every property is described, here or where it is defined', () => {
  for (const [place, node] of all) {
    for (const [name, child] of Object.entries((node.properties ?? {}) as Record<string, Node | true>)) {
      if (child === true) continue;
      expect(child.description ?? child.$ref, `${place}: ${name}`).toBeDefined();
    }
  }
});

test('every text, list, number and open object has a bound', () => {
  for (const [place, node] of all) {
    const types = [node.type].flat();
    if (types.includes('string')) expect(node.maxLength ?? node.pattern ?? node.enum, place).toBeDefined();
    if (types.includes('array')) expect(node.maxItems, place).toBeDefined();
    if (types.includes('integer')) expect([typeof node.minimum, typeof node.maximum], place).toEqual(['number', 'number']);
    if (types.includes('object') && node.additionalProperties !== false && node.if === undefined) expect(node.maxProperties, place).toBeDefined();
  }
});

test('every pattern has words, is anchored at both ends, and repeats nothing that can match the same text in two ways', () => {
  const patterns = new Set(all.map(([, node]) => node.pattern).filter((pattern) => typeof pattern === 'string'));
  expect(patterns).toEqual(new Set(Object.keys(patternWords)));
  for (const pattern of patterns) {
    expect(pattern).toMatch(/^\^.*\$$/);
    // A repeated group must start with a character of its own (a hyphen), or have a fixed length: then matching is linear.
    for (const [, group] of pattern.matchAll(/\(([^()]*)\)[*+{]/g)) expect(group).toMatch(/^-|^\[0-9a-f\]\{2\}$/);
    expect(() => new RegExp(pattern, 'u')).not.toThrow();
  }
});

test('the gates of the schema are the one- and two-qubit gates that can be simulated', () => {
  const named = all.find(([place]) => place === 'dataset/$defs/namedGate/properties/gate')?.[1].enum as string[];
  expect([...named].sort()).toEqual([...standardGates].filter(([, gate]) => gate.qubits < 3).map(([name]) => name).sort());
});

test('the compiled validators are those of the schemas: `tsx api/cli/make-validators.ts` after a change', async () => {
  const text = readFileSync(new URL('../../shared/formats/validators.js', import.meta.url), 'utf8');
  expect(text === await validatorModule()).toBe(true);
  expect(text).not.toMatch(/\bnew Function\b|\beval\(/);
});
