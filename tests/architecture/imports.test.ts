import { existsSync } from 'node:fs';
import { dirname, join, normalize } from 'node:path';
import { describe, expect, it } from 'vitest';
import { sourceFiles } from '#tests/support/source-files.ts';

const aliases: [string, string][] = [['#schema/', 'schema/'], ['#shared/', 'shared/'], ['#api/', 'api/'], ['#web/', 'web/src/'], ['#tests/', 'tests/']];
/** Statements begin a line; what stands in the middle of one is text. */
const specifier = /^(?:import|export)\s+(?:type\s+)?(?:[\w*{}\s,$]+\s+from\s+)?['"]([^'"]+)['"]|\bimport\(\s*['"]([^'"]+)['"]\s*\)/gm;
const files = sourceFiles();
const typeOnly = /^(?:import|export)\s+type\s+[\w*{}\s,$]+\s+from\s+['"]([^'"]+)['"]/gm;

const resolveFrom = (path: string, target: string): string | null => {
  const alias = aliases.find(([name]) => target.startsWith(name));
  if (alias) return alias[1] + target.slice(alias[0].length);
  return target.startsWith('.') ? normalize(join(dirname(path), target)) : null;
};

interface Edge {
  from: string;
  to: string;
  typesOnly: boolean;
}

const edges: Edge[] = files.flatMap(({ path, text }) => {
  const types = new Set([...text.matchAll(typeOnly)].map(([, target]) => target));
  return [...text.matchAll(specifier)].flatMap(([, first, second]) => {
    const target = first ?? second ?? '';
    const to = resolveFrom(path, target);
    return to === null ? [] : [{ from: path, to, typesOnly: types.has(target) }];
  });
});

const layer = (path: string): string => path.split('/')[0] ?? '';
const mayImport: Record<string, string[]> = {
  schema: ['schema'],
  shared: ['shared', 'schema'],
  api: ['api', 'shared', 'schema'],
  web: ['web', 'shared', 'schema'],
  tests: ['tests', 'web', 'api', 'shared', 'schema'],
};

describe('imports', () => {
  it('were found at all: the reader of imports reads', () => {
    expect(edges.length).toBeGreaterThan(files.length);
  });

  it('point from schema to shared to api and web, and never to tests', () => {
    expect(edges.filter(({ from, to }) => !mayImport[layer(from)]?.includes(layer(to))).map(({ from, to }) => `${from} -> ${to}`)).toEqual([]);
  });

  it('name files that exist, with their extension', () => {
    expect(edges.filter(({ to }) => !existsSync(to.split('?')[0] ?? '')).map(({ from, to }) => `${from} -> ${to}`)).toEqual([]);
  });

  it('form no circle, leaving aside what is imported for its types alone', () => {
    const next = new Map<string, string[]>();
    for (const { from, to, typesOnly } of edges) if (!typesOnly) next.set(from, [...(next.get(from) ?? []), to]);
    const state = new Map<string, 'open' | 'done'>();
    const circles: string[] = [];
    const visit = (path: string, trail: string[]): void => {
      if (state.get(path) === 'done') return;
      if (state.get(path) === 'open') return void circles.push([...trail.slice(trail.indexOf(path)), path].join(' -> '));
      state.set(path, 'open');
      for (const to of next.get(path) ?? []) visit(to, [...trail, path]);
      state.set(path, 'done');
    };
    for (const path of next.keys()) visit(path, []);
    expect(circles).toEqual([]);
  });

  it('of one feature of the client never reach into another', () => {
    const feature = (path: string): string | null => /^web\/src\/features\/([^/]+)\//.exec(path)?.[1] ?? null;
    expect(edges.filter(({ from, to }) => feature(from) && feature(to) && feature(from) !== feature(to)).map(({ from, to }) => `${from} -> ${to}`)).toEqual([]);
  });

  it('of packages are declared in package.json, the ones the product runs on as dependencies', async () => {
    const { default: manifest } = await import('../../package.json', { with: { type: 'json' } });
    /** Not shipped: tests, stand-ins, and the compiler of the kernels, whose product is committed. */
    const inside = (path: string): boolean => path.startsWith('tests/') || path.startsWith('api/fakes/') || path === 'api/lib/kernel-source.ts';
    const declared = (path: string): Record<string, string> => (inside(path) ? { ...manifest.dependencies, ...manifest.devDependencies } : manifest.dependencies);
    const missing = files.flatMap(({ path, text }) => {
      const types = new Set([...text.matchAll(typeOnly)].map(([, target]) => target));
      return [...text.matchAll(specifier)]
        .map(([, first, second]) => first ?? second ?? '')
        .filter((target) => /^[a-z@]/.test(target) && !target.startsWith('node:') && !target.startsWith('virtual:') && !types.has(target))
        .map((target) => target.split('/').slice(0, target.startsWith('@') ? 2 : 1).join('/'))
        .filter((name) => !(name in declared(path)))
        .map((name) => `${path}: ${name}`);
    });
    expect(missing).toEqual([]);
  });
});
