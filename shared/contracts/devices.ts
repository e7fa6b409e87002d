import { z } from 'zod';
import { deviceRef, figure, modality, timestamp } from './common.ts';

/** GET /api/v1/devices : every device with a public entry, by its id. */
export const deviceSummary = deviceRef.extend({ entries: z.number().int(), lastEntryAt: timestamp.nullable(), /** Its entries are demonstration data. */ demo: z.boolean() });
export const deviceList = z.object({ items: z.array(deviceSummary), nextCursor: z.string().nullable() });

/** GET /api/v1/devices/{id} : a device and its public entries, oldest first, each with its headline figure. */
export const device = deviceSummary.extend({
  history: z.array(z.object({ accession: z.string(), version: z.number().int(), gateClass: z.string(), gateClassTitle: z.string(), register: z.array(z.string()), lastCircuitAt: timestamp, frozenAt: timestamp, method: z.string(), headline: figure.nullable(), demo: z.boolean() })),
});

/** POST /api/v1/devices : a contributor registers a device of an organisation. */
export const deviceCreate = z.object({ organisation: z.string().max(64), name: z.string().trim().min(1).max(80), modality });

export type DeviceSummary = z.infer<typeof deviceSummary>;
export type Device = z.infer<typeof device>;
