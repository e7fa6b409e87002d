import { createHash } from 'node:crypto';
import { existsSync, mkdirSync, readdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { pathToFileURL } from 'node:url';

const settings = ['package-lock.json', 'package.json', 'tsconfig.json'];
const parts = {
  web: { sources: ['web', 'shared', 'schema', ...settings], output: 'dist/web/index.html' },
  api: { sources: ['api', 'shared', 'schema', ...settings], output: 'dist/api/server.js' },
} as const;

const filesIn = (path: string): string[] => {
  if (settings.includes(path)) return [path];
  return readdirSync(path, { recursive: true, withFileTypes: true }).filter((entry) => entry.isFile()).map((entry) => join(entry.parentPath, entry.name));
};

/** One digest over the names and bytes of all sources of a part. */
const stampOf = (sources: readonly string[]): string => {
  const hash = createHash('sha256').update(process.versions.node);
  for (const file of sources.flatMap(filesIn).sort()) hash.update(`\0${file}\0`).update(readFileSync(file));
  return hash.digest('hex');
};

const buildServer = async (): Promise<void> => {
  rmSync('dist/api', { recursive: true, force: true });
  // The builders are loaded only when there is something to build: it spares every other start their weight.
  const { build } = await import('esbuild');
  await build({
    entryPoints: { server: 'api/server.ts', worker: 'api/worker.ts', thread: 'api/jobs/thread.ts' },
    outdir: 'dist/api', bundle: true, platform: 'node', target: 'node20.19', format: 'esm', packages: 'external', sourcemap: 'linked', logLevel: 'warning',
  });
};

const buildWeb = async (): Promise<void> => {
  const { build } = await import('vite');
  await build({ configFile: 'web/vite.config.ts', logLevel: 'error' });
};

/** Builds client and server into dist/, each only if its sources changed since the last time. Returns what was built. */
export const buildAll = async (say: (line: string) => void): Promise<string[]> => {
  const built: string[] = [];
  for (const [name, make] of [['web', buildWeb], ['api', buildServer]] as const) {
    const { sources, output } = parts[name];
    const stampFile = `dist/.${name}.stamp`;
    const stamp = stampOf(sources);
    if (existsSync(output) && existsSync(stampFile) && readFileSync(stampFile, 'utf8') === stamp) continue;
    say(name === 'web' ? 'Building the pages …' : 'Building the server …');
    rmSync(stampFile, { force: true });
    await make();
    mkdirSync('dist', { recursive: true });
    writeFileSync(stampFile, stamp);
    built.push(name);
  }
  return built;
};

if (import.meta.url === pathToFileURL(process.argv[1] ?? '').href) {
  const built = await buildAll((line) => console.log(line));
  console.log(built.length === 0 ? 'Nothing has changed since the last build.' : `Built: ${built.join(', ')}.`);
}
