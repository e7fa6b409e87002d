import { readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';

const roots = ['schema', 'shared', 'api', 'web', 'tests'];
const code = /\.(ts|tsx|mjs|js)$/;

export interface SourceFile {
  path: string;
  text: string;
}

const walk = (folder: string): string[] =>
  readdirSync(folder, { withFileTypes: true }).flatMap((entry) => (entry.isDirectory() ? walk(join(folder, entry.name)) : [join(folder, entry.name)]));

/** Every file of the project's own code, by path from its root. */
export const sourceFiles = (): SourceFile[] =>
  roots.flatMap(walk).filter((path) => code.test(path)).map((path) => ({ path, text: readFileSync(path, 'utf8') }));

/** Every text file under version control or about to be: code, documents, settings. */
export const textFiles = (): SourceFile[] => {
  const here = readdirSync('.', { withFileTypes: true }).filter((entry) => entry.isFile() && entry.name !== 'package-lock.json').map((entry) => entry.name);
  const text = /\.(ts|tsx|mjs|js|json|md|css|html|svg|py|txt|sh)$|^\.|^[A-Z]+$/;
  return [...here, ...roots.flatMap(walk), ...walk('.ci')].filter((path) => text.test(path)).map((path) => ({ path, text: readFileSync(path, 'utf8') }));
};
