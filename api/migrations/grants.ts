import type { Client } from 'pg';

/** Quotes a name for use in SQL. */
const quoted = (name: string): string => `"${name.replaceAll('"', '""')}"`;

interface TableRow {
  name: string;
  frozen: boolean;
}

/**
 * Gives the application role what it needs and no more: on tables frozen without exception SELECT and INSERT,
 * on all others also UPDATE and DELETE. The list comes from the freeze triggers, so it cannot fall behind.
 * Runs after every migration; safe to repeat. Does nothing where one role owns and uses the tables.
 */
export const grantToApplication = async (owner: Client, applicationRole: string): Promise<void> => {
  const { rows: me } = await owner.query<{ name: string; database: string }>('select current_user as name, current_database() as database');
  const self = me[0];
  if (!self || self.name === applicationRole) return;
  const role = quoted(applicationRole);
  const { rows: tables } = await owner.query<TableRow>(
    `select c.relname as name,
            exists (select 1 from pg_trigger t where t.tgrelid = c.oid and t.tgname = 'freeze_row' and t.tgnargs = 0 and t.tgqual is null) as frozen
       from pg_class c join pg_namespace n on n.oid = c.relnamespace
      where n.nspname = 'public' and c.relkind in ('r', 'p')`,
  );
  await owner.query('begin');
  await owner.query(`grant connect on database ${quoted(self.database)} to ${role}`);
  await owner.query(`grant usage on schema public to ${role}`);
  for (const table of tables) {
    await owner.query(`revoke all on ${quoted(table.name)} from ${role}`);
    await owner.query(`grant select, insert${table.frozen ? '' : ', update, delete'} on ${quoted(table.name)} to ${role}`);
  }
  await owner.query(`grant usage, select on all sequences in schema public to ${role}`);
  await owner.query(`create schema if not exists pgboss authorization ${role}`);
  await owner.query('commit');
};

/**
 * Lets the application role create schemas while `work` runs: the queue library asks for that right when it first
 * makes its tables, even where its schema is there already.
 */
export const withSchemaRight = async (owner: Client, applicationRole: string, work: () => Promise<void>): Promise<void> => {
  const { rows } = await owner.query<{ name: string; database: string }>('select current_user as name, current_database() as database');
  const self = rows[0];
  if (!self || self.name === applicationRole) return work();
  const right = `create on database ${quoted(self.database)}`;
  await owner.query(`grant ${right} to ${quoted(applicationRole)}`);
  try {
    await work();
  } finally {
    await owner.query(`revoke ${right} from ${quoted(applicationRole)}`);
  }
};
