/** Method versions that this build can estimate with, oldest first. */
export const methodVersions = ['M1'] as const;

/** The version that new estimates are made with. */
export const currentMethod: (typeof methodVersions)[number] = 'M1';
