/** Method versions that this build can estimate with, oldest first. */
export const methodVersions = ['M1'] as const;
