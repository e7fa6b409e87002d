import { existsSync, mkdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { freePort } from '../free-port.ts';
import { giveToServer, runAsServer } from './run-as-server.ts';

/** The cluster's first role; everything else is made by it. */
export const adminRole = 'evenbeam_admin';

export interface ClusterPlan {
  /** PostgreSQL's program folder. */
  bin: string;
  /** Folder of this cluster alone: holds `data`, `server.log`. */
  folder: string;
  adminPassword: string;
  /** Tests only: nothing is worth keeping after a power cut. */
  unsafe?: boolean;
}

export interface RunningCluster {
  port: number;
  stop(): Promise<void>;
}

const dataOf = (plan: Pick<ClusterPlan, 'folder'>): string => join(plan.folder, 'data');

export const clusterExists = (plan: ClusterPlan): boolean => existsSync(join(dataOf(plan), 'PG_VERSION'));

/** Makes the cluster: page checksums, UTF-8, sorting by code point, password for every connection. */
export const createCluster = async (plan: ClusterPlan): Promise<void> => {
  mkdirSync(plan.folder, { recursive: true, mode: 0o700 });
  giveToServer(plan.folder);
  const passwordFile = join(plan.folder, 'password');
  writeFileSync(passwordFile, `${plan.adminPassword}\n`, { mode: 0o600 });
  giveToServer(passwordFile);
  try {
    await runAsServer(join(plan.bin, 'initdb'), [
      '--pgdata', dataOf(plan), '--username', adminRole, '--pwfile', passwordFile, '--auth', 'scram-sha-256',
      '--encoding', 'UTF8', '--locale', 'C', '--data-checksums', ...(plan.unsafe ? ['--no-sync'] : []),
    ]);
  } catch (error) {
    rmSync(dataOf(plan), { recursive: true, force: true });
    throw error;
  } finally {
    rmSync(passwordFile, { force: true });
  }
};

/** The process that a postmaster.pid names, if it is alive and serves this data folder. */
const livePostmaster = (plan: Pick<ClusterPlan, 'folder'>): number | null => {
  const file = join(dataOf(plan), 'postmaster.pid');
  if (!existsSync(file)) return null;
  const pid = Number(readFileSync(file, 'utf8').split('\n')[0]);
  try {
    const command = readFileSync(`/proc/${pid}/cmdline`, 'utf8');
    return command.includes(dataOf(plan)) ? pid : null;
  } catch {
    return null;
  }
};

/** The port of a server that is already running on this cluster, for reading along; null where none is. */
export const portOfRunning = (plan: Pick<ClusterPlan, 'folder'>): number | null => {
  if (livePostmaster(plan) === null) return null;
  // The fourth line of postmaster.pid, by PostgreSQL's own convention.
  const port = Number(readFileSync(join(dataOf(plan), 'postmaster.pid'), 'utf8').split('\n')[3]);
  return Number.isInteger(port) && port > 0 ? port : null;
};

const stop = (plan: ClusterPlan): Promise<string> => runAsServer(join(plan.bin, 'pg_ctl'), ['stop', '--pgdata', dataOf(plan), '--mode', 'fast', '--wait', '--timeout', '60']);

/** Removes what a crash left: stops a server that outlived its launcher, deletes a pid file whose server is gone. */
export const clearRemains = async (plan: ClusterPlan): Promise<'nothing' | 'stopped' | 'stale'> => {
  const file = join(dataOf(plan), 'postmaster.pid');
  if (!existsSync(file)) return 'nothing';
  if (livePostmaster(plan) !== null) {
    await stop(plan);
    return 'stopped';
  }
  rmSync(file, { force: true });
  return 'stale';
};

const settingsOf = (plan: ClusterPlan, port: number): string => {
  const settings = [
    'listen_addresses=127.0.0.1', "unix_socket_directories=''", 'max_connections=100', 'timezone=UTC', 'log_timezone=UTC',
    ...(plan.unsafe ? ['fsync=off', 'full_page_writes=off', 'synchronous_commit=off', 'autovacuum=off', 'max_wal_size=512MB'] : []),
  ];
  return [`-p ${port}`, ...settings.map((setting) => `-c ${setting}`)].join(' ');
};

/** Starts the cluster on a free loopback port; tries again if another program takes the port meanwhile. */
export const startCluster = async (plan: ClusterPlan): Promise<RunningCluster> => {
  await clearRemains(plan);
  const log = join(plan.folder, 'server.log');
  for (let attempt = 1; ; attempt += 1) {
    const port = await freePort();
    try {
      await runAsServer(join(plan.bin, 'pg_ctl'), ['start', '--pgdata', dataOf(plan), '--wait', '--timeout', '60', '--log', log, '--options', settingsOf(plan, port)]);
      return { port, stop: async () => void (await stop(plan)) };
    } catch (error) {
      const tail = existsSync(log) ? readFileSync(log, 'utf8').trim().split('\n').slice(-5).join('\n') : '';
      if (attempt === 3 || !/could not bind|Address already in use/.test(tail)) {
        throw new Error(`PostgreSQL did not start. The end of ${log}:\n${tail}`, { cause: error });
      }
    }
  }
};
