import type { EntityManager } from '@mikro-orm/postgresql';
import type { Factors } from '#api/jobs/tasks/task-factors.ts';
import { runSql } from '#api/lib/run-sql.ts';

/** Factors kept at most: the largest, a pair's, takes 6.4 MB, so this is below half a gigabyte. */
export const mostFactors = 64;

/** What is kept for the designs of a sheet; marks it as used. */
export const readFactors = async (em: EntityManager, runSheet: string, now: Date): Promise<Factors> => {
  const rows = await runSql<{ key: string; bytes: Buffer }>(em, 'update design_factor set used_at = $2 where run_sheet_id = $1 returning key, bytes', [runSheet, now]);
  return rows.map(({ key, bytes }) => [key, bytes]);
};

/** Keeps factors for a sheet. One that was there under the same key is replaced: it was not taken, so it was spoilt. */
export const keepFactors = async (em: EntityManager, runSheet: string, factors: Factors, now: Date): Promise<void> => {
  for (const [key, bytes] of factors) {
    await runSql(em, 'insert into design_factor (key, run_sheet_id, bytes, used_at) values ($1, $2, $3, $4) on conflict (key) do update set bytes = excluded.bytes, used_at = excluded.used_at', [key, runSheet, bytes, now]);
  }
};

/** Throws away those that were not used for the longest, beyond as many as are kept. */
export const forgetFactors = async (em: EntityManager, most = mostFactors): Promise<number> =>
  (await runSql(em, 'delete from design_factor where key in (select key from design_factor order by used_at desc, key offset $1) returning key', [most])).length;
