import type { EntityManager } from '@mikro-orm/postgresql';
import type { RunSheet as SheetFile, Seal } from '#shared/formats/types.ts';
import { runSql } from '#api/lib/run-sql.ts';

/** A drawn sheet as its file says; null before it is drawn. */
export const readSheet = async (em: EntityManager, id: string): Promise<SheetFile | null> => {
  const [row] = await runSql<{ bytes: Buffer }>(em, 'select bytes from run_sheet_file where run_sheet_id = $1', [id]);
  return row ? (JSON.parse(row.bytes.toString('utf8')) as SheetFile) : null;
};

/**
 * The opened seal of a sheet. For the worker's estimate and second opinions, for freezing and for the scrub only: a test holds that no other module
 * imports this, and no route answers with it before an entry is public.
 */
export const readSheetSeal = async (em: EntityManager, id: string): Promise<Seal | null> => {
  const [row] = await runSql<{ seal: Seal }>(em, 'select seal from run_sheet_secret where run_sheet_id = $1', [id]);
  return row?.seal ?? null;
};
