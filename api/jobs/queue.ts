import type { EntityManager } from '@mikro-orm/postgresql';
import PgBoss from 'pg-boss';
import type pg from 'pg';
import { queues, type Payload, type QueueName } from './queue-names.ts';

export interface SendOptions {
  /** Sends within this entity manager's transaction: the job exists if and only if the transaction commits. */
  em?: EntityManager;
  /** At most one waiting or running job with this key. */
  singletonKey?: string;
  startAfter?: Date;
  priority?: number;
}

/** The sending side of the job queue. */
export interface Queue {
  send<N extends QueueName>(name: N, data: Payload<N>, options?: SendOptions): Promise<string | null>;
  /** Are the queue's tables there and answering? */
  isUp(): Promise<boolean>;
  stop(): Promise<void>;
}

/** Runs SQL on the connection of the entity manager's open transaction; null outside of one. */
const transactionOf = async (em: EntityManager): Promise<PgBoss.Db> => {
  const transaction = em.getTransactionContext();
  if (!transaction) throw new Error('A job is sent with an entity manager only inside a transaction.');
  const client: pg.ClientBase = await transaction.client.acquireConnection();
  return { executeSql: (text, values) => client.query(text, values) };
};

/** Starts the queue for sending only: no supervision, no schedule, no polling. */
export const startQueue = async (databaseUrl: string, onError: (error: Error) => void): Promise<Queue> => {
  const boss = new PgBoss({ connectionString: databaseUrl, max: 3, supervise: false, schedule: false, migrate: false, application_name: 'evenbeam-queue' });
  boss.on('error', onError);
  await boss.start();
  return {
    send: async (name, data, { em, ...options } = {}) => {
      const payload = queues[name].parse(data);
      return boss.send(name, payload, { ...options, ...(em ? { db: await transactionOf(em) } : {}) });
    },
    isUp: async () => Boolean(await boss.isInstalled()),
    stop: () => boss.stop({ graceful: false }),
  };
};
