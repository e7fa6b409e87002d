import { existsSync, readdirSync } from 'node:fs';
import { delimiter, join } from 'node:path';
import { inheritedEnvironment } from '#api/config/config.ts';

const needed = ['initdb', 'pg_ctl', 'postgres'];
const hasAll = (folder: string): boolean => needed.every((name) => existsSync(join(folder, name)));

const versioned = (root: string): string[] => {
  if (!existsSync(root)) return [];
  const versions = readdirSync(root).filter((name) => /^\d+$/.test(name));
  return versions.sort((a, b) => Number(b) - Number(a)).map((name) => join(root, name, 'bin'));
};

/** Folder of the newest PostgreSQL server programs on this machine, Debian's place first; null if there are none. */
export const findPostgres = (): string | null => {
  const onPath = (inheritedEnvironment().PATH ?? '').split(delimiter).filter((folder) => folder !== '');
  return [...versioned('/usr/lib/postgresql'), ...onPath].find(hasAll) ?? null;
};
