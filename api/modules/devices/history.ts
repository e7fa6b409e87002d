import type { EntityManager } from '@mikro-orm/postgresql';
import type { Device } from '#shared/contracts/devices.ts';
import { headlineOf } from '#shared/domain/board-figures.ts';
import { EntryVersion } from '#api/entities/entry-version.ts';
import { runSql } from '#api/lib/run-sql.ts';
import { versionsWith } from '#api/modules/entries/public-entries.ts';
import { presentClassRef } from '#api/modules/gate-classes/presenter.ts';

export type Counts = Pick<Device, 'entries' | 'lastEntryAt' | 'demo'>;
export const noCounts: Counts = { entries: 0, lastEntryAt: null, demo: false };

/** Public entries of devices: how many, and when the last one became public. Devices without any are left out. */
export const publicCounts = async (em: EntityManager, devices: readonly string[]): Promise<Map<string, Counts>> => {
  const rows = await runSql<{ device_id: string; entries: number; last_at: string; demo: boolean }>(
    em,
    `select v.device_id, count(distinct v.accession)::int as entries, max(s.at) as last_at, bool_or(v.demo) as demo
       from entry_version v join entry_state s on s.accession = v.accession and s.version = v.version and s.state = 'frozen'
      where v.device_id = any($1) group by v.device_id`,
    [devices],
  );
  return new Map(rows.map((row) => [row.device_id, { entries: row.entries, lastEntryAt: new Date(row.last_at).toISOString(), demo: row.demo }]));
};

/** Ids of devices with a public entry, in order, after a given id. */
export const devicesWithEntries = async (em: EntityManager, after: string, limit: number): Promise<string[]> => {
  const rows = await runSql<{ id: string }>(
    em,
    `select d.id from device d
      where d.id > $1 and exists (select 1 from entry_version v join entry_state s on s.accession = v.accession and s.version = v.version and s.state = 'frozen' where v.device_id = d.id)
      order by d.id limit $2`,
    [after, limit],
  );
  return rows.map((row) => row.id);
};

/** The figures of a device over time: every public version that was not withdrawn, by its last circuit. */
export const presentHistory = async (em: EntityManager, device: string): Promise<Counts & Pick<Device, 'history'>> => {
  const versions = (await versionsWith(em, 'device_id', device)).filter((v) => v.state !== 'withdrawn');
  const rows = await em.find(EntryVersion, { id: { $in: versions.map((v) => v.id) } }, { exclude: ['review', 'sealedPoints', 'dataset'] });
  const byId = new Map(rows.map((row) => [row.id, row]));
  const history = versions.flatMap(({ id, accession, version, frozenAt }) => {
    const row = byId.get(id);
    if (!row) return [];
    return [{
      accession, version, gateClass: row.gateClass, gateClassTitle: presentClassRef(row.gateClass)?.title ?? row.gateClass, register: row.register, lastCircuitAt: row.endedAt.toISOString(),
      frozenAt: frozenAt.toISOString(), method: row.method, headline: headlineOf(row.summary.figures, row.register.length), demo: row.demo,
    }];
  });
  history.sort((a, b) => (a.lastCircuitAt === b.lastCircuitAt ? 0 : a.lastCircuitAt < b.lastCircuitAt ? -1 : 1));
  return { ...((await publicCounts(em, [device])).get(device) ?? noCounts), history };
};
