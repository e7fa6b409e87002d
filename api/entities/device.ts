import { defineEntity, p, type InferEntity } from '@mikro-orm/core';
import { instant } from './columns.ts';
import { Organisation } from './organisation.ts';
import { User } from './user.ts';

export const modalities = ['superconducting', 'trapped-ion', 'neutral-atom', 'photonic', 'spin', 'simulated', 'other'] as const;

/** A device of an organisation. Its row never changes: entries speak of it by this name. */
export const Device = defineEntity({
  name: 'Device',
  tableName: 'device',
  properties: {
    /** Short name for addresses, unique in the registry: "larkspur-quantics-meadow-5". */
    id: p.string().primary(),
    organisation: () => p.manyToOne(Organisation).ref(),
    name: p.string(),
    modality: p.string().$type<(typeof modalities)[number]>(),
    createdBy: () => p.manyToOne(User).ref().nullable(),
    createdAt: instant(),
  },
});
export type Device = InferEntity<typeof Device>;
