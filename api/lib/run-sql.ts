import type { EntityManager } from '@mikro-orm/postgresql';
import type { ClientBase } from 'pg';

/** A value as the driver takes it. Bytes travel as bound parameters, never as text inside the statement. */
export type SqlValue = string | number | boolean | null | Date | Uint8Array | readonly string[];

/**
 * Runs one statement on the connection of the entity manager's open transaction, or on a pooled one outside of any.
 * For what the ORM does poorly: large bytes, counters, reports.
 */
export const runSql = async <Row extends object>(em: EntityManager, text: string, values: readonly SqlValue[] = []): Promise<Row[]> => {
  const bound = values.map((value) => (value instanceof Uint8Array && !Buffer.isBuffer(value) ? Buffer.from(value.buffer, value.byteOffset, value.byteLength) : value));
  const transaction = em.getTransactionContext();
  if (transaction) {
    const client: ClientBase = await transaction.client.acquireConnection();
    return (await client.query<Row>(text, bound)).rows;
  }
  const pool = em.getKnex().client;
  const client: ClientBase = await pool.acquireConnection();
  try {
    return (await client.query<Row>(text, bound)).rows;
  } finally {
    await pool.releaseConnection(client);
  }
};
