import { existsSync } from 'node:fs';
import { pathToFileURL } from 'node:url';
import { resolve } from 'node:path';
import pg from 'pg';
import type { Config } from '#api/config/config.ts';

type SeedDemo = (options: { config: Config; progress: (line: string) => void }) => Promise<void>;

const module = 'api/demo/seed.ts';

/** Has any entry been made yet? */
export const isEmpty = async (databaseUrl: string): Promise<boolean> => {
  const client = new pg.Client({ connectionString: databaseUrl });
  await client.connect();
  try {
    const { rows } = await client.query<{ empty: boolean }>('select not exists (select 1 from entry_version) as empty');
    return rows[0]?.empty ?? true;
  } finally {
    await client.end();
  }
};

/** Fills an empty registry with the demo registry, through the same services as anyone's data. */
export const seedIfEmpty = async (config: Config, say: (line: string) => void): Promise<void> => {
  if (!existsSync(module) || !(await isEmpty(config.databaseUrl))) return;
  say('Filling the registry with the demo data (once) …');
  const { seedDemo } = (await import(pathToFileURL(resolve(module)).href)) as { seedDemo: SeedDemo };
  await seedDemo({ config, progress: (line) => say(`  ${line}`) });
};
