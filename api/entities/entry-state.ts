import { defineEntity, p, type InferEntity } from '@mikro-orm/core';
import type { EntryState } from '#shared/domain/life-cycle.ts';
import { instant } from './columns.ts';

/** A state that a version of an entry came into; the newest row holds. Append-only. */
export const EntryStateRow = defineEntity({
  name: 'EntryStateRow',
  tableName: 'entry_state',
  properties: {
    id: p.bigint('string').primary().autoincrement(),
    accession: p.string(),
    version: p.integer(),
    state: p.string().$type<EntryState>(),
    at: instant(),
    reason: p.text().nullable(),
    byId: p.uuid().nullable(),
  },
});
export type EntryStateRow = InferEntity<typeof EntryStateRow>;
