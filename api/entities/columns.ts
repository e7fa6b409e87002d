import { randomUUID } from 'node:crypto';
import { p } from '@mikro-orm/core';

/** Primary key shared by every table whose rows have no public number. */
export const uuidKey = () => p.uuid().primary().onCreate(() => randomUUID());

/** An instant, with time zone, to the millisecond. */
export const instant = () => p.datetime(3);
