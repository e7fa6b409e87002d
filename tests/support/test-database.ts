import { MikroORM } from '@mikro-orm/postgresql';
import pg from 'pg';
import { afterAll, beforeAll, inject } from 'vitest';
import { adminRole } from '#api/cli/postgres/cluster.ts';
import { addressOf, applicationRole, ownerRole } from '#api/cli/postgres/roles.ts';
import { templateDatabase, testPasswords } from '#api/cli/postgres/test-cluster.ts';
import { ormOptions } from '#api/mikro-orm.config.ts';

export interface TestDatabase {
  name: string;
  /** As the application. */
  url: string;
  /** As the owner of the tables. */
  ownerUrl: string;
  orm: MikroORM;
}

const asAdmin = async (sql: string): Promise<void> => {
  const client = new pg.Client({ connectionString: addressOf(adminRole, testPasswords.admin, inject('postgresPort'), 'postgres') });
  await client.connect();
  try {
    await client.query(sql);
  } finally {
    await client.end();
  }
};

/** A fresh copy of the migrated template. The caller drops it. */
export const createTestDatabase = async (): Promise<TestDatabase> => {
  const port = inject('postgresPort');
  const name = `t_${process.pid}_${Date.now().toString(36)}`;
  await asAdmin(`create database ${name} template ${templateDatabase} owner ${ownerRole}`);
  const url = addressOf(applicationRole, testPasswords.application, port, name);
  const orm = await MikroORM.init(ormOptions(url, 5));
  return { name, url, ownerUrl: addressOf(ownerRole, testPasswords.owner, port, name), orm };
};

export const dropTestDatabase = async (database: TestDatabase): Promise<void> => {
  await database.orm.close(true);
  await asAdmin(`drop database ${database.name} with (force)`);
};

/** Registers a database for the test file it is called in; the returned function gives it once the file runs. */
export const useTestDatabase = (): (() => TestDatabase) => {
  let database: TestDatabase | undefined;
  beforeAll(async () => {
    database = await createTestDatabase();
  });
  afterAll(async () => {
    if (database) await dropTestDatabase(database);
  });
  return () => {
    if (!database) throw new Error('The test database is there only while tests run.');
    return database;
  };
};
