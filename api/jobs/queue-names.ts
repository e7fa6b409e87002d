import { z } from 'zod';

/** Queues by name with the payload each takes. The sender needs only this; handlers live in the worker. */
export const queues = {
  estimate: z.object({ submission: z.string(), round: z.number().int().min(1) }),
  'draw-sheet': z.object({ runSheet: z.string() }),
  'lift-embargoes': z.object({}),
  'deliver-mail': z.object({}),
  're-estimate': z.object({ campaign: z.string(), entryVersion: z.uuid() }),
  'advance-campaigns': z.object({}),
  'register-dois': z.object({}),
  opinions: z.object({ submission: z.string(), estimate: z.uuid() }),
  'house-keeping': z.object({}),
} as const;

export type QueueName = keyof typeof queues;
export type Payload<N extends QueueName> = z.infer<(typeof queues)[N]>;
export const queueNames = Object.keys(queues) as QueueName[];
