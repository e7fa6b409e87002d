import { defineEntity, p, type InferEntity } from '@mikro-orm/core';
import { Organisation } from './organisation.ts';
import { instant, uuidKey } from './columns.ts';
import { User } from './user.ts';

/** A key with which an organisation's scripts act. Only its SHA-256 is kept. */
export const ApiToken = defineEntity({
  name: 'ApiToken',
  tableName: 'api_token',
  properties: {
    id: uuidKey(),
    organisation: () => p.manyToOne(Organisation).ref(),
    createdBy: () => p.manyToOne(User).ref(),
    name: p.string(),
    /** The first characters, to tell tokens apart in a list. */
    prefix: p.string(),
    sha256: p.string().unique(),
    createdAt: instant(),
    expiresAt: instant().nullable(),
    lastUsedAt: instant().nullable(),
    revokedAt: instant().nullable(),
  },
});
export type ApiToken = InferEntity<typeof ApiToken>;
