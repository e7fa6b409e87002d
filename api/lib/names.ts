import type { EntityManager } from '@mikro-orm/postgresql';
import { runSql } from './run-sql.ts';

/** The next number of a sequence. Numbers may be left out; accessions have a counter of their own. */
export const nextNumber = async (em: EntityManager, sequence: 'submission_number' | 'run_sheet_number' | 'campaign_number'): Promise<number> => {
  const [row] = await runSql<{ n: string }>(em, `select nextval('${sequence}') as n`);
  return Number(row?.n);
};
