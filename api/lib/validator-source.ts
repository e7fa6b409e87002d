import { readFileSync } from 'node:fs';
import { createRequire } from 'node:module';
import { Ajv2020 } from 'ajv/dist/2020.js';
import standalone from 'ajv/dist/standalone/index.js';
import { build } from 'esbuild';

const root = new URL('../../', import.meta.url);
const formats = ['dataset', 'circuits', 'run-sheet', 'seal', 'gate-class', 'result'] as const;

/** Long lists whose items are checked one by one, so that a file with a million faults costs no more than one with fifty. */
const itemLists: Partial<Record<(typeof formats)[number], { list: string[]; item: string }>> = {
  dataset: { list: ['$defs', 'patch', 'properties', 'circuits'], item: '#/$defs/circuit' },
  circuits: { list: ['properties', 'circuits'], item: '#/$defs/plainCircuit' },
  'run-sheet': { list: ['$defs', 'sheetPatch', 'properties', 'circuits'], item: '#/$defs/sheetCircuit' },
};

type Schema = Record<string, unknown> & { $id: string };

/** The schema without its prose, which checks nothing. A property may be called "title"; its value is no string. */
function readSchema(format: string): Schema {
  const text = readFileSync(new URL(`schema/${format}/1.0.0.schema.json`, root), 'utf8');
  return JSON.parse(text, (key, value: unknown) => ((key === 'title' || key === 'description') && typeof value === 'string' ? undefined : value)) as Schema;
}

/** The same schema with the items of its long list left unchecked. */
function shellOf(schema: Schema, list: readonly string[]): Schema {
  const shell = structuredClone(schema);
  let node: Record<string, unknown> = shell;
  for (const step of list) node = node[step] as Record<string, unknown>;
  node.items = true;
  return { ...shell, $id: `${schema.$id}?shell` };
}

/** Source of one module that exports the validators, either stopping at the first fault or gathering all. */
function moduleSource(allErrors: boolean): string {
  const ajv = new Ajv2020({ allErrors, strict: true, allowUnionTypes: true, messages: false, formats: { 'date-time': true }, code: { source: true, esm: true } });
  const exported: Record<string, string> = {};
  for (const format of formats) {
    const schema = readSchema(format);
    const name = format.replace(/-(.)/g, (_, letter: string) => letter.toUpperCase());
    ajv.addSchema(schema);
    const items = itemLists[format];
    const shell = items ? shellOf(schema, items.list) : schema;
    if (items) ajv.addSchema(shell);
    exported[`${name}Shell`] = shell.$id;
    if (items) exported[`${name}Item`] = `${schema.$id}${items.item}`;
  }
  return standalone(ajv, exported);
}

/** The validators of every format as one browser-ready module without eval: what shared/formats/validators.js holds. */
export async function validatorModule(): Promise<string> {
  const sources: Record<string, string> = { first: moduleSource(false), all: moduleSource(true) };
  const require = createRequire(import.meta.url);
  const result = await build({
    stdin: { contents: 'export * as first from "first"; export * as all from "all";', resolveDir: '.' },
    bundle: true, format: 'esm', platform: 'neutral', target: 'es2022', minify: true, write: false, legalComments: 'none',
    banner: { js: '/* eslint-disable */ // Written by api/cli/make-validators.ts from schema/; do not edit.' },
    plugins: [{
      name: 'schema-validators',
      setup({ onResolve, onLoad }) {
        onResolve({ filter: /^(first|all)$/ }, ({ path }) => ({ path, namespace: 'source' }));
        onResolve({ filter: /^ajv\// }, ({ path }) => ({ path: require.resolve(path) }));
        onLoad({ filter: /.*/, namespace: 'source' }, ({ path }) => ({ contents: sources[path] ?? '', loader: 'js', resolveDir: '.' }));
      },
    }],
  });
  return result.outputFiles[0]?.text ?? '';
}
