import { defineEntity, p, type InferEntity } from '@mikro-orm/core';
import { instant, uuidKey } from './columns.ts';

/** A person who has signed in at least once, or was invited by a steward. */
export const User = defineEntity({
  name: 'User',
  tableName: 'app_user',
  properties: {
    id: uuidKey(),
    /** Subject of the sign-in service; null for a person invited but not yet seen. */
    subject: p.string().nullable().unique(),
    /** Lower case. */
    email: p.string().unique(),
    name: p.string(),
    createdAt: instant(),
    lastSignInAt: instant().nullable(),
    disabledAt: instant().nullable(),
  },
});
export type User = InferEntity<typeof User>;
