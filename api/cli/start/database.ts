import { join } from 'node:path';
import pg from 'pg';
import type { LauncherEnvironment } from '#api/config/environment.ts';
import { clusterExists, createCluster, portOfRunning, startCluster } from '../postgres/cluster.ts';
import { providePostgres } from '../postgres/install.ts';
import { reachableFolder } from '../postgres/reachable-folder.ts';
import { addressOf, applicationRole, ensureRolesAndDatabase, ownerRole } from '../postgres/roles.ts';
import type { Secrets } from './secrets.ts';

export interface StartedDatabase {
  url: string;
  ownerUrl: string;
  /** Made and started here, as opposed to one that DATABASE_URL names. */
  own: boolean;
  stop(): Promise<void>;
}

const database = 'evenbeam';

/** The database that was asked for, after a look whether it answers. */
const given = async (url: string, ownerUrl: string | undefined): Promise<StartedDatabase> => {
  for (const address of new Set([url, ownerUrl ?? url])) {
    const client = new pg.Client({ connectionString: address, connectionTimeoutMillis: 10_000 });
    try {
      await client.connect();
    } catch (fault) {
      const { host, pathname } = new URL(address);
      throw new Error(`The database at ${host}${pathname} cannot be used: ${fault instanceof Error ? fault.message : String(fault)}.`, { cause: fault });
    } finally {
      await client.end().catch(() => undefined);
    }
  }
  return { url, ownerUrl: ownerUrl ?? url, own: false, stop: async () => undefined };
};

/** The database of DATABASE_URL, or a private PostgreSQL of this folder: found or installed, made, started. */
export const startDatabase = async (settings: LauncherEnvironment, dataDir: string, secrets: Secrets, say: (line: string) => void): Promise<StartedDatabase> => {
  if (settings.DATABASE_URL) return given(settings.DATABASE_URL, settings.DATABASE_OWNER_URL);
  const bin = providePostgres(say);
  const plan = { bin, folder: join(reachableFolder(dataDir), 'postgres'), adminPassword: secrets.admin };
  if (!clusterExists(plan)) {
    say('Making a private PostgreSQL database …');
    await createCluster(plan);
  }
  const cluster = await startCluster(plan);
  try {
    await ensureRolesAndDatabase(cluster.port, secrets, database);
  } catch (fault) {
    await cluster.stop();
    throw fault;
  }
  return {
    url: addressOf(applicationRole, secrets.application, cluster.port, database),
    ownerUrl: addressOf(ownerRole, secrets.owner, cluster.port, database),
    own: true,
    stop: cluster.stop,
  };
};

/** As `startDatabase`, but a registry that runs in this folder is left running, and its database is read along. */
export const reachDatabase = async (settings: LauncherEnvironment, dataDir: string, secrets: Secrets, say: (line: string) => void): Promise<StartedDatabase> => {
  const port = settings.DATABASE_URL ? null : portOfRunning({ folder: join(reachableFolder(dataDir), 'postgres') });
  if (port === null) return startDatabase(settings, dataDir, secrets, say);
  return { url: addressOf(applicationRole, secrets.application, port, database), ownerUrl: addressOf(ownerRole, secrets.owner, port, database), own: true, stop: async () => undefined };
};
