import { mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { chmodSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import pg from 'pg';
import { afterAll, describe, expect, it } from 'vitest';
import { findPostgres } from '#api/cli/postgres/binaries.ts';
import { adminRole, clearRemains, clusterExists, createCluster, startCluster } from '#api/cli/postgres/cluster.ts';
import { addressOf, applicationRole, ensureRolesAndDatabase, ownerRole } from '#api/cli/postgres/roles.ts';

const parent = mkdtempSync(join(tmpdir(), 'evenbeam-cluster-'));
// The server's own user must be able to pass.
chmodSync(parent, 0o755);
const passwords = { admin: 'admin-password', owner: 'owner-password', application: 'application-password' };
const plan = { bin: findPostgres() ?? '', folder: join(parent, 'postgres'), adminPassword: passwords.admin, unsafe: true };
const pidFile = join(plan.folder, 'data', 'postmaster.pid');

const ask = async <T extends object>(url: string, sql: string): Promise<T[]> => {
  const client = new pg.Client({ connectionString: url });
  await client.connect();
  try {
    return (await client.query<T>(sql)).rows;
  } finally {
    await client.end();
  }
};

afterAll(async () => {
  await clearRemains(plan);
  rmSync(parent, { recursive: true, force: true });
});

describe('a private cluster', () => {
  it('is made with checksums, listens on loopback only, and asks everyone for a password', async () => {
    expect(clusterExists(plan)).toBe(false);
    await createCluster(plan);
    expect(clusterExists(plan)).toBe(true);
    const cluster = await startCluster(plan);
    await ensureRolesAndDatabase(cluster.port, passwords, 'evenbeam');
    await ensureRolesAndDatabase(cluster.port, passwords, 'evenbeam');
    const url = addressOf(adminRole, passwords.admin, cluster.port, 'evenbeam');
    const settings = await ask<{ checksums: string; listen: string; sockets: string }>(url, "select current_setting('data_checksums') as checksums, current_setting('listen_addresses') as listen, current_setting('unix_socket_directories') as sockets");
    expect(await ask(addressOf(ownerRole, passwords.owner, cluster.port, 'evenbeam'), 'select current_user as me')).toEqual([{ me: ownerRole }]);
    expect(settings).toEqual([{ checksums: 'on', listen: '127.0.0.1', sockets: '' }]);
    await expect(ask(addressOf(applicationRole, 'wrong', cluster.port, 'evenbeam'), 'select 1')).rejects.toThrow('password authentication failed');
    await cluster.stop();
  });

  it('starts over a pid file whose server is gone, also when its number belongs to another program now', async () => {
    for (const pid of [999_999_999, process.pid]) {
      writeFileSync(pidFile, `${pid}\n${join(plan.folder, 'data')}\n`);
      const cluster = await startCluster(plan);
      expect(Number(readFileSync(pidFile, 'utf8').split('\n')[0])).not.toBe(pid);
      await cluster.stop();
    }
  });

  it('that outlived its launcher is stopped and started again', async () => {
    const forgotten = await startCluster(plan);
    const pid = readFileSync(pidFile, 'utf8').split('\n')[0];
    expect(await clearRemains(plan)).toBe('stopped');
    const cluster = await startCluster(plan);
    expect(readFileSync(pidFile, 'utf8').split('\n')[0]).not.toBe(pid);
    await cluster.stop();
    await expect(forgotten.stop()).rejects.toThrow('pg_ctl failed');
  });
});
