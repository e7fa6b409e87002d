import { methodVersions as known, officialMethod } from '#shared/method/versions.ts';

/** Official method versions of this build, oldest first. Drafts are computed by campaigns only and are not told here. */
export const methodVersions: readonly string[] = known.filter((v) => v.status === 'official').map((v) => v.id);

/** The version that new estimates are made with. */
export const currentMethod: string = officialMethod.id;
