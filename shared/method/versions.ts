import { METHOD, PASSES } from '#shared/method/constants.ts';

/** One way in which every dataset can be estimated. Two versions never give the same random numbers: the seed names the version. */
export interface MethodVersion {
  /** Stands in results, seeds and the log. */
  id: string;
  /** official: entries are frozen with it and boards rank by it. draft: computed by a campaign, to see what a change would do. */
  status: 'official' | 'draft';
  /** Passes of the estimate in all, the first-order one included. */
  passes: number;
  /** The day from which the version has been offered. */
  since: string;
  /** What it does, or what it changes in the version before, in plain words. */
  changes: string;
}

/** Every version that this build can estimate with, oldest first. A version once used for an entry is never changed or taken out. */
export const methodVersions: readonly MethodVersion[] = [
  {
    id: METHOD, status: 'official', passes: PASSES, since: '2026-12-01',
    changes: 'The first version: one fixed linear inverse in eight passes, two thousand bootstrap replicates.',
  },
  {
    id: 'M2', status: 'draft', passes: 2 * PASSES, since: '2026-12-01',
    changes: 'Sixteen passes in place of eight; all else is equal. On strong noise the passes of M1 may stop before they have settled; this version shows, entry by entry, what the further passes would change.',
  },
];

/** The version that new estimates are made with and entries are frozen with. */
export const officialMethod: MethodVersion = methodVersions.filter((v) => v.status === 'official').at(-1)!;

export const findMethod = (id: string): MethodVersion | null => methodVersions.find((v) => v.id === id) ?? null;

/** The version of that name; any other name is refused with the list of those there are. */
export function requireMethod(id: string): MethodVersion {
  const version = findMethod(id);
  if (!version) throw new RangeError(`${JSON.stringify(id)} is not a method version of this build, which has ${methodVersions.map((v) => v.id).join(', ')}.`);
  return version;
}
