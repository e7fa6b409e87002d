/** How a lost or failed attempt is treated where a job says nothing else. */
export const queueDefaults = {
  retryLimit: 3,
  retryDelay: 5,
  retryBackoff: true,
  /** An attempt that takes longer counts as lost. The longest estimate measured takes minutes. */
  expireInSeconds: 30 * 60,
  retentionDays: 30,
} as const;
