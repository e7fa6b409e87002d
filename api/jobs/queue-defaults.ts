import type { QueueName } from './queue-names.ts';

export interface QueueOptions {
  /** Attempts after the first. */
  retryLimit: number;
  /** Seconds before the second attempt; doubled, with some chance, each time after. */
  retryDelay: number;
  retryBackoff: boolean;
  /** An attempt that takes longer counts as lost, even if its worker seems alive. */
  expireInSeconds: number;
  retentionDays: number;
}

const usual: QueueOptions = { retryLimit: 3, retryDelay: 2, retryBackoff: true, expireInSeconds: 30 * 60, retentionDays: 30 };

/** Where a queue differs from the usual. A mail server may be away for hours: 12 tries span about two. */
const special: Partial<Record<QueueName, Partial<QueueOptions>>> = {
  // They give way to estimates, for hours on a busy day.
  opinions: { expireInSeconds: 6 * 60 * 60 },
  'deliver-mail': { retryLimit: 12, expireInSeconds: 5 * 60 },
  // The campaign notes what failed for good, and a steward may have it tried again.
  're-estimate': { retryLimit: 2 },
};

/** How lost and failed attempts at a queue's jobs are treated. */
export const queueOptions = (name: QueueName): QueueOptions => ({ ...usual, ...special[name] });
