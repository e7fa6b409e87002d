import type { EntityManager } from '@mikro-orm/postgresql';
import { versionedAccessionOf } from '#shared/domain/ids.ts';
import { runSql } from '#api/lib/run-sql.ts';
import type { Work } from '#api/lib/work.ts';

/** The DOI of a version follows from its name alone, so that no repeat can make a second one. */
export const doiOf = (prefix: string, accession: string, version: number): string => `${prefix}/${versionedAccessionOf(accession, version).toLowerCase()}`;

/**
 * Owes a version its DOI, in the transaction in which it becomes public. Nothing happens where no agency is configured,
 * and nothing for entries of the demonstration: what is invented is not registered.
 */
export const oweDoi = async (work: Work, { accession, version }: { accession: string; version: number }): Promise<void> => {
  if (!work.doiPrefix) return;
  const owed = await runSql<{ doi: string }>(
    work.em,
    `insert into doi_registration (accession, version, doi, owed_at, next_try_at) select accession, version, $3, $4, $4 from entry_version
      where accession = $1 and version = $2 and not demo on conflict do nothing returning doi`,
    [accession, version, doiOf(work.doiPrefix, accession, version), work.clock.now()],
  );
  if (owed.length > 0) await work.queue.send('register-dois', {}, { em: work.em });
};

/** Owes their DOIs to versions that became public while no agency was configured. */
export const oweMissingDois = async (em: EntityManager, prefix: string, now: Date): Promise<void> => {
  await runSql(
    em,
    `insert into doi_registration (accession, version, doi, owed_at, next_try_at)
       select v.accession, v.version, $1 || '/' || lower(v.accession) || '.' || v.version, $2, $2 from entry_version v
        where not v.demo and not exists (select 1 from doi_registration d where d.accession = v.accession and d.version = v.version)
          and exists (select 1 from entry_state s where s.accession = v.accession and s.version = v.version and s.state = 'frozen')
       on conflict do nothing`,
    [prefix, now],
  );
};
