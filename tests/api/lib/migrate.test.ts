import pg from 'pg';
import { afterAll, beforeAll, describe, expect, inject, it } from 'vitest';
import { adminRole } from '#api/cli/postgres/cluster.ts';
import { addressOf, applicationRole, ownerRole } from '#api/cli/postgres/roles.ts';
import { testPasswords } from '#api/cli/postgres/test-cluster.ts';
import { startQueue } from '#api/jobs/queue.ts';
import { migrate } from '#api/lib/migrate.ts';
import { migrations } from '#api/migrations/index.ts';

const name = `t_migrate_${process.pid}`;
const address = (role: string, password: string, database = name): string => addressOf(role, password, inject('postgresPort'), database);
const admin = async (sql: string): Promise<void> => {
  const client = new pg.Client({ connectionString: address(adminRole, testPasswords.admin, 'postgres') });
  await client.connect();
  await client.query(sql).finally(() => client.end());
};
const ownerUrl = (): string => address(ownerRole, testPasswords.owner);

beforeAll(() => admin(`create database ${name} owner ${ownerRole}`));
afterAll(() => admin(`drop database ${name} with (force)`));

describe('bringing a database up to date', () => {
  it('works with one role for everything, as a hosted database may offer, and does nothing the second time', async () => {
    expect(await migrate(ownerUrl(), ownerUrl())).toEqual(migrations.map((migration) => migration.name));
    expect(await migrate(ownerUrl(), ownerUrl())).toEqual([]);
    const queue = await startQueue(ownerUrl(), () => undefined);
    expect(await queue.isUp()).toBe(true);
    await queue.stop();
  });

  it('leaves the application role no right to create schemas once its queue is there', async () => {
    await migrate(ownerUrl(), address(applicationRole, testPasswords.application)).catch(() => undefined);
    const client = new pg.Client({ connectionString: address(applicationRole, testPasswords.application) });
    await client.connect();
    const { rows } = await client.query<{ may: boolean }>("select has_database_privilege(current_user, current_database(), 'create') as may");
    await client.end();
    expect(rows).toEqual([{ may: false }]);
  });
});
