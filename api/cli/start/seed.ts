import pg from 'pg';
import type { Config } from '#api/config/config.ts';

/** Has any entry been made yet? The demo comes whole or not at all, so one entry means that it is there. */
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
  if (!(await isEmpty(config.databaseUrl))) return;
  say('Filling the registry with the demo data (once; an interrupted start begins it anew) …');
  // Loaded only when needed: later starts do not wait for it.
  const { seedDemo } = await import('#api/demo/seed.ts');
  await seedDemo({ config, progress: (words, share) => say(`  ${String(Math.floor(100 * share)).padStart(3)} %  ${words}`) });
};
