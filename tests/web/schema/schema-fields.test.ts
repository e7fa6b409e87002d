import { existsSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import schema from '#schema/dataset/1.0.0.schema.json' with { type: 'json' };
import { readDataset } from '#shared/formats/read-dataset.ts';
import { exampleDataset } from '#web/features/schema/example.ts';
import { fieldGroups, type SchemaNode } from '#web/features/schema/schema-fields.ts';

const groups = fieldGroups(schema as SchemaNode);
const field = (group: string, name: string) => groups.find((g) => g.id === group)?.rows.find((row) => row.name === name);

describe('documentation read from the schema', () => {
  it('names every property of every object of the schema once', () => {
    const documented = groups.flatMap((g) => g.rows.map((row) => `${g.title}.${row.name}`));
    const defs: [string, SchemaNode][] = [['Dataset', schema as SchemaNode], ...Object.entries((schema as SchemaNode).$defs ?? {})];
    const named = defs.flatMap(([key, node]) => Object.keys(node.properties ?? {}).map((name) => `${node.title ?? key}.${name}`));
    expect([...documented].sort()).toEqual([...named].sort());
  });

  it('says what is required, what a field holds and its limits', () => {
    expect(field('dataset', 'title')).toMatchObject({ required: true, kind: 'text', limits: '1 to 200 characters' });
    expect(field('dataset', 'extra')).toMatchObject({ required: false });
    expect(field('dataset', 'runSheet')).toMatchObject({ required: false, kind: 'runSheet or null' });
    expect(field('dataset', 'patches')).toMatchObject({ kind: 'list of patch objects' });
    expect(field('device', 'modality')?.kind).toContain('"trapped-ion"');
    expect(field('circuit', 'shots')?.kind).toBe('whole number');
  });

  it('every field has a meaning in words', () => {
    for (const group of groups) for (const row of group.rows) expect(row.description, `${group.id}.${row.name}`).not.toBe('');
  });

  it('the example follows the format', () => {
    const reading = readDataset(new TextEncoder().encode(JSON.stringify(exampleDataset)));
    expect(reading.ok ? [] : reading.errors).toEqual([]);
  });

  it('every format named on the page lies in the repository', () => {
    for (const name of ['dataset', 'run-sheet', 'seal', 'circuits', 'result', 'gate-class']) expect(existsSync(`schema/${name}/1.0.0.schema.json`), name).toBe(true);
  });
});
