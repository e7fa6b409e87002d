import { defineEntity, p, type InferEntity } from '@mikro-orm/core';
import { Organisation } from './organisation.ts';
import { instant, uuidKey } from './columns.ts';
import { User } from './user.ts';

/** A person's part in an organisation over a span of time. Ended, never deleted: past membership is an interest. */
export const Membership = defineEntity({
  name: 'Membership',
  tableName: 'membership',
  properties: {
    id: uuidKey(),
    user: () => p.manyToOne(User).ref(),
    organisation: () => p.manyToOne(Organisation).ref(),
    /** contributor: of a provider or laboratory; editor, viewer: of a buyer; member: belongs, without a part in either. */
    role: p.enum(['contributor', 'editor', 'viewer', 'member']),
    since: instant(),
    until: instant().nullable(),
  },
});
export type Membership = InferEntity<typeof Membership>;
