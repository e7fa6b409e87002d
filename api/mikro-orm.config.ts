import { Migrator } from '@mikro-orm/migrations';
import { defineConfig, type Options } from '@mikro-orm/postgresql';
import { entities } from './entities/index.ts';
import { migrations } from './migrations/index.ts';

/** ORM settings for one connection address. The command-line tool reads the default export below. */
export const ormOptions = (url: string, pool = 10): Options =>
  defineConfig({
    clientUrl: url,
    entities,
    extensions: [Migrator],
    pool: { min: 0, max: pool },
    forceUtcTimezone: true,
    forceUndefined: false,
    strict: true,
    validateRequired: true,
    // Faults reach the caller as errors; the library's own chatter would land on the console.
    logger: () => undefined,
    discovery: { warnWhenNoEntities: false },
    migrations: { migrationsList: migrations, snapshot: false, tableName: 'schema_migration', transactional: true, allOrNothing: true },
    schemaGenerator: { skipTables: ['session'], ignoreSchema: ['pgboss'] },
  });
