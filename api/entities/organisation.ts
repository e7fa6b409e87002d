import { defineEntity, p, type InferEntity } from '@mikro-orm/core';
import { instant, uuidKey } from './columns.ts';

/** A provider, an independent laboratory, a buyer, or the registry's own office. */
export const Organisation = defineEntity({
  name: 'Organisation',
  tableName: 'organisation',
  properties: {
    id: uuidKey(),
    /** Short name for addresses, unique: "larkspur-quantics". */
    slug: p.string().unique(),
    name: p.string().unique(),
    kind: p.enum(['provider', 'laboratory', 'buyer', 'registry']),
    createdAt: instant(),
  },
});
export type Organisation = InferEntity<typeof Organisation>;
