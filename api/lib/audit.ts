import type { EntityManager } from '@mikro-orm/postgresql';
import { AuditEvent } from '#api/entities/audit-event.ts';
import type { Caller } from './caller.ts';

export interface AuditInput {
  at: Date;
  /** "submission.accept" */
  action: string;
  subjectType: string;
  subjectId: string;
  /** Who did it; absent = the registry itself. */
  caller?: Caller;
  organisationId?: string | null;
  requestId?: string | null;
  detail?: Record<string, unknown>;
}

const actorOf = (caller: Caller | undefined): Pick<AuditEvent, 'actorKind' | 'actorId'> => {
  if (caller?.user) return { actorKind: 'person', actorId: caller.user.id };
  if (caller?.token) return { actorKind: 'token', actorId: caller.token.id };
  return { actorKind: 'registry', actorId: null };
};

/** Adds an event to the trail; written with the transaction of the move it tells of. */
export const recordAudit = (em: EntityManager, input: AuditInput): AuditEvent =>
  em.create(AuditEvent, {
    at: input.at,
    action: input.action,
    ...actorOf(input.caller),
    organisationId: input.organisationId ?? null,
    subjectType: input.subjectType,
    subjectId: input.subjectId,
    requestId: input.requestId ?? null,
    detail: input.detail ?? {},
  });
