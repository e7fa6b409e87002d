import type { EntityManager } from '@mikro-orm/postgresql';
import type { CitationRecord, VersionRef } from '#shared/citation/record.ts';
import { runSql } from '#api/lib/run-sql.ts';
import { requireVersion, requireVersions, withRows, type FrozenVersion } from '#api/modules/entries/load.ts';
import { presentItem } from '#api/modules/entries/presenter.ts';

/** A version as it is cited, with the stored row for whoever needs more. */
export interface Cited {
  record: CitationRecord;
  shown: FrozenVersion;
}

const withdrawalOf = async (em: EntityManager, { accession, version, state }: FrozenVersion): Promise<CitationRecord['withdrawn']> => {
  if (state !== 'withdrawn') return null;
  const [row] = await runSql<{ at: string; reason: string | null }>(em, `select at, reason from entry_state where accession = $1 and version = $2 and state = 'withdrawn'`, [accession, version]);
  return row ? { at: new Date(row.at).toISOString(), reason: row.reason ?? 'No reason is on record.' } : null;
};

/** One public version, or the latest where none is named; not-found for all others, those under embargo among them. */
export const readCited = async (em: EntityManager, accession: string, version: number | null, registry: string): Promise<Cited> => {
  const [latest, ...others] = await requireVersions(em, accession);
  const wanted = version === null ? latest : await requireVersion(em, accession, version);
  const [shown] = await withRows(em, [wanted]);
  if (!shown) throw new Error(`${accession}.${wanted.version} has a state but no row.`);
  const { row } = shown;
  const rows = await runSql<{ version: number; doi: string }>(em, 'select version, doi from doi_registration where accession = $1 and registered_at is not null', [accession]);
  const dois = new Map(rows.map((r) => [r.version, r.doi]));
  const refTo = (found: { version: number } | undefined): VersionRef | null => (found ? { version: found.version, doi: dois.get(found.version) ?? null } : null);
  const newestFirst = [latest, ...others];
  const item = presentItem(shown);
  return {
    shown,
    record: {
      accession, version: shown.version, state: shown.state, title: row.title, contributors: row.dataset.contributors, organisation: row.organisation.unwrap().name,
      device: { name: item.device.name, provider: item.device.provider.name, modality: item.device.modality }, gateClass: { id: row.gateClass, title: item.gateClassTitle }, register: row.register, method: row.method,
      frozenAt: shown.frozenAt.toISOString(), startedAt: row.dataset.startedAt, endedAt: row.dataset.endedAt, licence: row.dataset.licence, contentId: row.contentId, bytes: row.fileSize,
      registry, doi: dois.get(shown.version) ?? null,
      previous: refTo(newestFirst.find((v) => v.version < shown.version)), next: refTo(newestFirst.filter((v) => v.version > shown.version).at(-1)),
      withdrawn: await withdrawalOf(em, shown),
    },
  };
};
