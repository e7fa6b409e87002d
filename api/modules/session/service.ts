import type { EntityManager } from '@mikro-orm/postgresql';
import { recordAudit } from '#api/lib/audit.ts';
import type { Caller } from '#api/lib/caller.ts';

/** Removes every session of the caller from the session table. */
export const endAllSessions = async (em: EntityManager, caller: Caller, now: Date, requestId: string): Promise<void> =>
  em.transactional(async (tx) => {
    const id = caller.user?.id ?? '';
    await tx.execute("delete from session where sess #>> '{passport,user}' = ?", [id]);
    recordAudit(tx, { at: now, action: 'session.end-all', caller, requestId, subjectType: 'user', subjectId: id });
  });
