/** Days and moments as the record writes them: UTC, year first. */

/** "2026-05-04" */
export const dayOf = (iso: string): string => new Date(iso).toISOString().slice(0, 10);

/** "2026-05-04, 09:31 UTC" */
export const momentOf = (iso: string): string => `${dayOf(iso)}, ${new Date(iso).toISOString().slice(11, 16)} UTC`;
