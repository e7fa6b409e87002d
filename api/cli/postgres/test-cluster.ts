import { execFileSync } from 'node:child_process';
import { createHash, randomBytes } from 'node:crypto';
import { existsSync, mkdirSync, readdirSync, readFileSync, renameSync, rmSync } from 'node:fs';
import { join, resolve } from 'node:path';
import { migrate } from '#api/lib/migrate.ts';
import { clearRemains, createCluster, startCluster, type ClusterPlan } from './cluster.ts';
import { reachableFolder } from './reachable-folder.ts';
import { addressOf, applicationRole, ensureRolesAndDatabase, ownerRole } from './roles.ts';

/** Fixed passwords: the cluster holds invented rows, lives for one run, and listens on loopback only. */
export const testPasswords = { admin: 'throwaway-admin', owner: 'throwaway-owner', application: 'throwaway-application' };
export const templateDatabase = 'evenbeam_template';

export interface TestCluster {
  port: number;
  stop(): Promise<void>;
}

const sources = ['api/migrations', 'api/jobs/prepare-queues.ts', 'api/jobs/queue-names.ts', 'api/jobs/queue-defaults.ts', 'api/cli/postgres', 'package.json'];

const filesOf = (path: string): string[] =>
  path.endsWith('.ts') || path.endsWith('.json') ? [path] : readdirSync(path, { withFileTypes: true }).flatMap((entry) => filesOf(join(path, entry.name)));

/** Changes whenever a migration or a queue does. */
const stampOf = (bin: string): string => {
  const hash = createHash('sha256').update(bin);
  for (const file of sources.flatMap(filesOf).sort()) hash.update(file).update(readFileSync(file));
  return hash.digest('hex').slice(0, 16);
};

const alive = (pid: number): boolean => existsSync(`/proc/${pid}`);

/** Folders of runs whose process is gone are stopped and removed. */
const clearOldRuns = async (root: string, bin: string): Promise<void> => {
  for (const name of readdirSync(root)) {
    const pid = Number(/^(?:run|making)-(\d+)(?:-[0-9a-f]+)?$/.exec(name)?.[1] ?? NaN);
    if (Number.isNaN(pid) || alive(pid)) continue;
    const plan = { bin, folder: join(root, name), adminPassword: testPasswords.admin };
    await clearRemains(plan);
    rmSync(plan.folder, { recursive: true, force: true });
  }
};

const makeTemplate = async (plan: ClusterPlan): Promise<void> => {
  await createCluster(plan);
  const cluster = await startCluster(plan);
  try {
    await ensureRolesAndDatabase(cluster.port, testPasswords, templateDatabase);
    const url = (role: string, password: string): string => addressOf(role, password, cluster.port, templateDatabase);
    await migrate(url(ownerRole, testPasswords.owner), url(applicationRole, testPasswords.application));
  } finally {
    await cluster.stop();
  }
};

/**
 * Starts a throwaway cluster for one test run. A stopped, migrated cluster is kept as a folder and copied
 * (under a second), so that runs at the same time do not meet.
 */
export const startTestCluster = async (bin: string): Promise<TestCluster> => {
  const root = reachableFolder(resolve('.data/test'));
  await clearOldRuns(root, bin);
  const stamp = stampOf(bin);
  // One process may start two: the tests of the services and those in the browser each have their own.
  const own = `${process.pid}-${randomBytes(4).toString('hex')}`;
  const template = join(root, `template-${stamp}`);
  if (!existsSync(template)) {
    const making = { bin, folder: join(root, `making-${own}`), adminPassword: testPasswords.admin, unsafe: true };
    await makeTemplate(making);
    if (!existsSync(template)) renameSync(making.folder, template);
    for (const name of readdirSync(root)) if (name.startsWith('template-') && name !== `template-${stamp}`) rmSync(join(root, name), { recursive: true, force: true });
  }
  const folder = join(root, `run-${own}`);
  mkdirSync(root, { recursive: true });
  rmSync(folder, { recursive: true, force: true });
  execFileSync('cp', ['--archive', '--reflink=auto', template, folder]);
  const cluster = await startCluster({ bin, folder, adminPassword: testPasswords.admin, unsafe: true });
  return {
    port: cluster.port,
    stop: async () => {
      await cluster.stop();
      rmSync(folder, { recursive: true, force: true });
    },
  };
};
