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

/** On a terminal one line that is written over; elsewhere a line for each twentieth of the work. */
const progressLine = (say: (line: string) => void): ((words: string, share: number) => void) => {
  let last = -1;
  return (words, share) => {
    const line = `  ${String(Math.floor(100 * share)).padStart(3)} %  ${words}`;
    const part = Math.floor(20 * share);
    if (process.stdout.isTTY) process.stdout.write(`\r\u001b[2K${line}${share >= 1 ? '\n' : ''}`);
    else if (part > last) say(line);
    last = part;
  };
};

/** Fills an empty registry with the demo registry, through the same services as anyone's data. */
export const seedIfEmpty = async (config: Config, say: (line: string) => void): Promise<void> => {
  if (!(await isEmpty(config.databaseUrl))) return;
  say('Filling the registry with the demo data (once; an interrupted start begins it anew) …');
  // Loaded only when needed: later starts do not wait for it.
  const { seedDemo } = await import('#api/demo/seed.ts');
  await seedDemo({ config, progress: progressLine(say) });
};
