import type { FactorStore } from '#shared/method/factors.ts';

/** Factors by key, as they travel between the database and the threads. */
export type Factors = [key: string, bytes: Uint8Array][];

/** A store for one task: reads what it was given, and gathers what it made. */
export const taskFactors = (given: Factors = []): FactorStore & { made: Factors } => {
  const held = new Map(given);
  const made: Factors = [];
  return {
    made,
    get: (key) => held.get(key) ?? null,
    put: (key, bytes) => {
      held.set(key, bytes);
      made.push([key, bytes]);
    },
  };
};
