import { spawnSync } from 'node:child_process';
import { existsSync, mkdirSync, readFileSync, writeFileSync } from 'node:fs';
import { findPostgres } from './binaries.ts';
import { runsAsRoot } from './run-as-server.ts';
import { hasApt, installPackages } from '../apt.ts';

const clusterConfig = '/etc/postgresql-common/createcluster.conf';

/** Debian would start a cluster of its own on installation; the registry's private one is enough. */
const forbidMainCluster = (): void => {
  const line = 'create_main_cluster = false';
  const before = existsSync(clusterConfig) ? readFileSync(clusterConfig, 'utf8') : '';
  if (/^\s*create_main_cluster\s*=\s*false/m.test(before)) return;
  mkdirSync('/etc/postgresql-common', { recursive: true });
  writeFileSync(clusterConfig, `${before.replace(/^\s*create_main_cluster\s*=.*$/m, '').trimEnd()}\n${line}\n`.trimStart());
};

/** The server user exists once the package is there; a machine with foreign programs may lack it. */
const hasServerUser = (): boolean => spawnSync('id', ['postgres'], { stdio: 'ignore' }).status === 0;

/**
 * PostgreSQL's program folder, installed from Debian if need be. Throws one clear sentence where that cannot be done.
 */
export const providePostgres = (say: (line: string) => void): string => {
  const found = findPostgres();
  if (found && (!runsAsRoot() || hasServerUser())) return found;
  const advice = 'Install it (on Debian or Ubuntu: `apt-get install postgresql`), or set DATABASE_URL to a PostgreSQL database of yours.';
  if (!runsAsRoot()) throw new Error(`There is no PostgreSQL server on this machine, and installing it takes root. ${advice}`);
  if (!hasApt()) throw new Error(`There is no PostgreSQL server on this machine, and no apt-get to install it with. ${advice}`);
  say('Installing PostgreSQL (apt-get, about a minute) …');
  forbidMainCluster();
  installPackages(['postgresql']);
  const folder = findPostgres();
  if (!folder) throw new Error(`apt-get installed PostgreSQL, but its programs are not under /usr/lib/postgresql. ${advice}`);
  return folder;
};
