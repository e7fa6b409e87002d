import type { EntityManager } from '@mikro-orm/postgresql';
import type { EntryState } from '#shared/domain/life-cycle.ts';
import { runSql, type SqlValue } from '#api/lib/run-sql.ts';

/** A version that readers may see, with the state it is in now and the moment it became public. */
export interface PublicVersion {
  id: string;
  accession: string;
  version: number;
  state: Exclude<EntryState, 'embargoed'>;
  frozenAt: Date;
}

interface Row {
  id: string;
  accession: string;
  version: number;
  state: PublicVersion['state'];
  /** As text: the ORM turns the driver's own parsing of instants off. */
  frozen_at: string;
}

const asVersion = (row: Row): PublicVersion => ({ id: row.id, accession: row.accession, version: row.version, state: row.state, frozenAt: new Date(row.frozen_at) });

/** Versions with their newest state; those under embargo are left out by the join on the moment of freezing. */
const versions = `
  select v.id, v.accession, v.version, v.gate_class, v.device_id, v.organisation_id, now_in.state, frozen.at as frozen_at
    from entry_version v
    join lateral (select at from entry_state s where s.accession = v.accession and s.version = v.version and s.state = 'frozen' limit 1) frozen on true
    join lateral (select state from entry_state s where s.accession = v.accession and s.version = v.version order by s.id desc limit 1) now_in on true`;

/** All public versions of one accession, newest first. */
export const versionsOf = async (em: EntityManager, accession: string): Promise<PublicVersion[]> =>
  (await runSql<Row>(em, `${versions} where v.accession = $1 order by v.version desc`, [accession])).map(asVersion);

/** All public versions of a gate class or of a device, oldest first. */
export const versionsWith = async (em: EntityManager, column: 'gate_class' | 'device_id', value: string): Promise<PublicVersion[]> =>
  (await runSql<Row>(em, `${versions} where v.${column} = $1 order by frozen_at, v.accession, v.version`, [value])).map(asVersion);

export interface EntryFilter {
  gateClass?: string | undefined;
  device?: string | undefined;
  provider?: string | undefined;
  q?: string | undefined;
}

const likeText = (text: string): string => `%${text.replace(/[\\%_]/g, '\\$&')}%`;

/** One page of entries, each by its latest public version, newest first; one row more than the limit where there are more. */
export const listEntries = async (em: EntityManager, filter: EntryFilter, limit: number, after: { at: Date; id: string } | null): Promise<PublicVersion[]> => {
  const values: SqlValue[] = [limit + 1];
  const bind = (value: SqlValue): string => `$${values.push(value)}`;
  const conditions = ['true'];
  if (filter.gateClass !== undefined) conditions.push(`l.gate_class = ${bind(filter.gateClass)}`);
  if (filter.device !== undefined) conditions.push(`l.device_id = ${bind(filter.device)}`);
  if (filter.provider !== undefined) conditions.push(`o.slug = ${bind(filter.provider)}`);
  if (filter.q !== undefined && filter.q !== '') {
    const text = bind(likeText(filter.q));
    conditions.push(`(d.name ilike ${text} or o.name ilike ${text} or l.accession ilike ${text})`);
  }
  if (after) conditions.push(`(l.frozen_at, l.accession) < (${bind(after.at)}, ${bind(after.id)})`);
  const rows = await runSql<Row>(
    em,
    `select l.id, l.accession, l.version, l.state, l.frozen_at
       from (select distinct on (p.accession) p.* from (${versions}) p order by p.accession, p.version desc) l
       join device d on d.id = l.device_id join organisation o on o.id = d.organisation_id
      where ${conditions.join(' and ')}
      order by l.frozen_at desc, l.accession desc limit $1`,
    values,
  );
  return rows.map(asVersion);
};
