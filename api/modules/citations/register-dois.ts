import type { EntityManager } from '@mikro-orm/postgresql';
import { toDatacite } from '#shared/citation/datacite.ts';
import type { Deps } from '#api/lib/deps.ts';
import { runSql } from '#api/lib/run-sql.ts';
import { tellAgency, type AgencyEvent } from './agency.ts';
import { oweMissingDois } from './owe-doi.ts';
import { readCited } from './record.ts';

/** DOIs told of in one run; more wait for the next. */
const batch = 50;
const firstPauseMs = 30_000;
const longestPauseMs = 6 * 3_600_000;

interface Owed {
  accession: string;
  version: number;
  doi: string;
  revision: number;
  told: number;
  attempts: number;
}

const pauseAfter = (attempts: number): number => Math.min(longestPauseMs, firstPauseMs * 2 ** Math.min(attempts, 20));

/** Tells the agency of one version. The row is held meanwhile, so two workers never tell of it both. Gives the fault, or null. */
const tellOne = (em: EntityManager, deps: Deps, { accession, version }: Owed, signal: AbortSignal): Promise<string | null> =>
  em.fork().transactional(async (tx) => {
    const now = deps.clock.now();
    const key = [accession, version];
    const agency = deps.config.doi;
    const [row] = await runSql<Owed>(tx, 'select * from doi_registration where accession = $1 and version = $2 and told < revision for update skip locked', key);
    if (!row || !agency) return null;
    try {
      const { record } = await readCited(tx, accession, version, deps.config.publicUrl);
      const event: AgencyEvent = record.state === 'withdrawn' ? 'hide' : 'publish';
      await tellAgency(agency, { ...toDatacite(record), doi: row.doi }, event, row.told > 0, signal);
      await runSql(tx, 'update doi_registration set told = $3, registered_at = coalesce(registered_at, $4), attempts = attempts + 1, last_error = null where accession = $1 and version = $2', [...key, row.revision, now]);
      return null;
    } catch (fault) {
      signal.throwIfAborted();
      const reason = fault instanceof Error ? `${fault.message}${fault.cause instanceof Error ? ` (${fault.cause.message})` : ''}` : String(fault);
      await runSql(tx, 'update doi_registration set attempts = attempts + 1, last_error = $3, next_try_at = $4 where accession = $1 and version = $2', [...key, reason, new Date(now.getTime() + pauseAfter(row.attempts))]);
      return `${row.doi}: ${reason}`;
    }
  });

/** Tells the agency of every DOI that is due. A failure is noted at its row and tried again after a pause that doubles, up to six hours. */
export const registerDois = async (em: EntityManager, deps: Deps, signal: AbortSignal): Promise<void> => {
  const agency = deps.config.doi;
  if (!agency) return;
  await oweMissingDois(em, agency.prefix, deps.clock.now());
  // A prefix of another agency, such as the stand-in's, is not this one's to register.
  const due = await runSql<Owed>(em, 'select * from doi_registration where told < revision and next_try_at <= $1 and starts_with(doi, $2) order by next_try_at, accession, version limit $3', [deps.clock.now(), `${agency.prefix}/`, batch]);
  for (const row of due) {
    signal.throwIfAborted();
    const fault = await tellOne(em, deps, row, signal);
    if (fault) deps.log.warn({ fault }, 'a DOI could not be registered; it is tried again');
  }
};
