import type { EntityManager } from '@mikro-orm/postgresql';
import { runSql } from '#api/lib/run-sql.ts';

/** Where the stored replicates of one figure lie. Nothing stored is ever changed, so a place names its numbers for good. */
export interface ReplicatesPlace {
  /** Id of the frozen version. */
  id: string;
  /** Method version: the one it was frozen with, or one of a result that was added later. */
  method: string;
  /** Row of the figure in the stored table: its place among the figures of the result. */
  row: number;
  /** Replicates in a row of the table. */
  count: number;
}

/** The replicates of one figure for each of several versions, in their order. Only that figure's bytes leave the database. */
export const loadReplicates = async (em: EntityManager, places: readonly ReplicatesPlace[]): Promise<Float64Array[]> => {
  const rows = await runSql<{ part: Buffer | null }>(
    em,
    `select coalesce(substring(frozen.bytes from wanted.start for wanted.length), substring(added.replicates from wanted.start for wanted.length)) as part
       from unnest($1::uuid[], $2::text[], $3::int[], $4::int[]) with ordinality as wanted (id, method, start, length, place)
       join entry_version v on v.id = wanted.id
       left join entry_bytes frozen on frozen.accession = v.accession and frozen.version = v.version and frozen.kind = 'replicates' and v.method = wanted.method
       left join entry_result added on added.entry_version_id = v.id and added.method = wanted.method
      order by wanted.place`,
    [places.map((p) => p.id), places.map((p) => p.method), places.map((p) => String(8 * p.row * p.count + 1)), places.map((p) => String(8 * p.count))],
  );
  return places.map(({ id, method, count }, i) => {
    const part = rows[i]?.part ?? null;
    if (part?.length !== 8 * count) throw new Error(`Version ${id} by ${method} has ${part?.length ?? 0} bytes of replicates where ${8 * count} were stored.`);
    return Float64Array.from({ length: count }, (_, b) => part.readDoubleLE(8 * b));
  });
};
