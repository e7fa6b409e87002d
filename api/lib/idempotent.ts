import { createHash } from 'node:crypto';
import { UniqueConstraintViolationException } from '@mikro-orm/core';
import { AppError } from '#shared/errors/app-error.ts';
import { IdempotencyKey } from '#api/entities/idempotency-key.ts';
import type { Caller } from './caller.ts';
import { JsonReply } from './reply.ts';
import { inTransaction, type Work } from './work.ts';

const keyPattern = /^[\x21-\x7e]{1,200}$/;

const scopeOf = (caller: Caller): string => (caller.token ? `organisation:${caller.token.organisation}` : `user:${caller.user?.id ?? ''}`);

/** Reads the header; null where it is absent and may be. */
export const readIdempotencyKey = (value: string | undefined, required: boolean): string | null => {
  if (value === undefined || value === '') {
    if (required) throw new AppError('missing-idempotency-key', 'Send an Idempotency-Key header of your choosing, one for each submission.');
    return null;
  }
  if (!keyPattern.test(value)) throw new AppError('invalid-request', `The Idempotency-Key header must have 1 to 200 printable characters without blanks. Given: ${JSON.stringify(value.slice(0, 80))}.`);
  return value;
};

/** What makes two requests the same: method, path and content. */
export const fingerprintOf = (...parts: readonly string[]): string => createHash('sha256').update(JSON.stringify(parts)).digest('hex');

interface Repeatable {
  key: string | null;
  fingerprint: string;
}

const replayOf = async <T>(work: Work, scope: string, { key, fingerprint }: Repeatable): Promise<JsonReply<T> | null> => {
  const found = key === null ? null : await work.em.fork().findOne(IdempotencyKey, { scope, key });
  if (!found) return null;
  if (found.fingerprint !== fingerprint) throw new AppError('idempotency-mismatch', 'This Idempotency-Key was used before, for another request or another body. Use a new key.');
  return new JsonReply(found.body as T, { status: found.status, headers: { ...found.headers, 'idempotency-replayed': 'true' } });
};

/**
 * Does something once for each key of a caller. The answer is kept in the transaction that did it, so that a repeat
 * gets the same answer, and of two at the same instant one waits for the other and is told its answer. A refusal is not kept.
 */
export const idempotently = async <T>(work: Work, request: Repeatable, run: (work: Work) => Promise<JsonReply<T>>): Promise<JsonReply<T>> => {
  if (request.key === null || work.caller === null) return run(work);
  const scope = scopeOf(work.caller);
  const { key, fingerprint } = request;
  const before = await replayOf<T>(work, scope, request);
  if (before) return before;
  try {
    return await inTransaction(work, async (tx) => {
      const kept = tx.em.create(IdempotencyKey, { scope, key, fingerprint, status: 0, headers: {}, body: {}, createdAt: tx.clock.now() });
      await tx.em.flush();
      const answer = await run(tx);
      tx.em.assign(kept, { status: answer.options.status ?? 200, headers: answer.options.headers ?? {}, body: answer.body });
      return answer;
    });
  } catch (fault) {
    const after = fault instanceof UniqueConstraintViolationException && fault.message.includes('idempotency_key') ? await replayOf<T>(work, scope, request) : null;
    if (after) return after;
    throw fault;
  }
};
