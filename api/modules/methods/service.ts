import type { EntityManager } from '@mikro-orm/postgresql';
import type { MethodView } from '#shared/contracts/methods.ts';
import { methodVersions } from '#shared/method/versions.ts';
import { runSql } from '#api/lib/run-sql.ts';

/** Public versions that have a result by each method version, frozen with it or added later. */
const countResults = async (em: EntityManager): Promise<Map<string, number>> => {
  const rows = await runSql<{ method: string; n: string }>(em, `
    select method, count(*) as n from (
      select v.id, v.accession, v.version, v.method from entry_version v
      union select v.id, v.accession, v.version, r.method from entry_result r join entry_version v on v.id = r.entry_version_id) every_result
     where exists (select 1 from entry_state s where s.accession = every_result.accession and s.version = every_result.version and s.state = 'frozen')
     group by method`);
  return new Map(rows.map(({ method, n }) => [method, Number(n)]));
};

export const listMethods = async (em: EntityManager): Promise<MethodView[]> => {
  const results = await countResults(em);
  return methodVersions.map(({ id, status, passes, since, changes }) => ({ id, status, passes, since, changes, results: results.get(id) ?? 0 }));
};
