import type { TestProject } from 'vitest/node';
import { findPostgres } from '#api/cli/postgres/binaries.ts';
import { startTestCluster } from '#api/cli/postgres/test-cluster.ts';

declare module 'vitest' {
  export interface ProvidedContext {
    postgresPort: number;
  }
}

/** One throwaway PostgreSQL cluster for the run. */
export default async (project: TestProject): Promise<() => Promise<void>> => {
  const bin = findPostgres();
  if (!bin) throw new Error('No PostgreSQL server programs on this machine: `npm test` installs them.');
  const cluster = await startTestCluster(bin);
  project.provide('postgresPort', cluster.port);
  return () => cluster.stop();
};
