import { defineEntity, p, type InferEntity } from '@mikro-orm/core';
import { instant } from './columns.ts';

/**
 * What was done, by whom, to what. Append-only: the database refuses a change or a removal.
 * Holds ids as plain values, so that the trail outlives what it speaks of.
 */
export const AuditEvent = defineEntity({
  name: 'AuditEvent',
  tableName: 'audit_event',
  properties: {
    id: p.bigint('string').primary().autoincrement(),
    at: instant(),
    /** "submission.accept" */
    action: p.string(),
    actorKind: p.enum(['person', 'token', 'registry']),
    actorId: p.uuid().nullable(),
    organisationId: p.uuid().nullable(),
    /** "submission", "S-000012" */
    subjectType: p.string(),
    subjectId: p.string(),
    requestId: p.string().nullable(),
    detail: p.json<Record<string, unknown>>(),
  },
});
export type AuditEvent = InferEntity<typeof AuditEvent>;
