import { randomInt } from 'node:crypto';
import pg from 'pg';

/** First key of the two-part advisory locks that stand for living workers. */
const lockClass = 0x0eb1;

export interface WorkerLease {
  key: number;
  /** Is the worker with this key dead? Its lock went with its connection. */
  isDead(key: number): Promise<boolean>;
  release(): Promise<void>;
}

/**
 * A lock held on a connection of its own for as long as this worker lives. When the process dies, however it
 * dies, PostgreSQL frees the lock at once, and others see that its jobs are lost.
 */
export const takeLease = async (databaseUrl: string, onLost: (fault: Error) => void): Promise<WorkerLease> => {
  const client = new pg.Client({ connectionString: databaseUrl, application_name: 'evenbeam-worker-lease', keepAlive: true });
  client.on('error', onLost);
  await client.connect();
  let key = 0;
  for (let taken = false; !taken; ) {
    key = randomInt(1, 2 ** 31);
    taken = (await client.query<{ taken: boolean }>('select pg_try_advisory_lock($1, $2) as taken', [lockClass, key])).rows[0]?.taken ?? false;
  }
  return {
    key,
    isDead: async (other) => {
      if (other === key) return false;
      const { rows } = await client.query<{ free: boolean }>('select pg_try_advisory_lock($1, $2) as free', [lockClass, other]);
      if (!rows[0]?.free) return false;
      await client.query('select pg_advisory_unlock($1, $2)', [lockClass, other]);
      return true;
    },
    release: async () => {
      client.removeListener('error', onLost);
      client.on('error', () => undefined);
      await client.end();
    },
  };
};
