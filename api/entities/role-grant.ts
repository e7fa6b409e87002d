import { defineEntity, p, type InferEntity } from '@mikro-orm/core';
import { instant, uuidKey } from './columns.ts';
import { User } from './user.ts';

/** A role in the registry itself, over a span of time. Ended, never deleted. */
export const RoleGrant = defineEntity({
  name: 'RoleGrant',
  tableName: 'role_grant',
  properties: {
    id: uuidKey(),
    user: () => p.manyToOne(User).ref(),
    role: p.enum(['curator', 'steward']),
    since: instant(),
    until: instant().nullable(),
  },
});
export type RoleGrant = InferEntity<typeof RoleGrant>;
