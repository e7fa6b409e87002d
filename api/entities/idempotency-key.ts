import { defineEntity, p, type InferEntity } from '@mikro-orm/core';
import { instant, uuidKey } from './columns.ts';

/** The answer once given to a request with an Idempotency-Key, given again when the request is repeated. */
export const IdempotencyKey = defineEntity({
  name: 'IdempotencyKey',
  tableName: 'idempotency_key',
  properties: {
    id: uuidKey(),
    /** Who asked: "user:<id>" or "organisation:<id>". */
    scope: p.string(),
    key: p.string(),
    /** SHA-256 of method, path and content; a key used again for something else is refused. */
    fingerprint: p.string(),
    status: p.integer(),
    headers: p.json<Record<string, string>>(),
    body: p.json<unknown>(),
    createdAt: instant(),
  },
});
export type IdempotencyKey = InferEntity<typeof IdempotencyKey>;
