import { MikroORM } from '@mikro-orm/postgresql';
import pg from 'pg';
import { grantToApplication, withSchemaRight } from '#api/migrations/grants.ts';
import { ormOptions } from '#api/mikro-orm.config.ts';
import { prepareQueues } from '#api/jobs/prepare-queues.ts';

/** The role in a connection address: postgres://ROLE:…@… */
export const roleOf = (url: string): string => decodeURIComponent(new URL(url).username);

/**
 * Brings the schema up to date as the owner, renews the application role's grants, and lets the
 * application role make its queue tables. Returns the names of the migrations that ran.
 */
export const migrate = async (ownerUrl: string, applicationUrl: string): Promise<string[]> => {
  const orm = await MikroORM.init(ormOptions(ownerUrl, 2));
  let ran: string[];
  try {
    ran = (await orm.getMigrator().up()).map((m) => m.name);
  } finally {
    await orm.close(true);
  }
  const owner = new pg.Client({ connectionString: ownerUrl });
  await owner.connect();
  try {
    await grantToApplication(owner, roleOf(applicationUrl));
    await withSchemaRight(owner, roleOf(applicationUrl), () => prepareQueues(applicationUrl));
  } finally {
    await owner.end();
  }
  return ran;
};
