import type { EntityManager } from '@mikro-orm/postgresql';
import { accessionPattern } from '#shared/domain/ids.ts';
import { AppError } from '#shared/errors/app-error.ts';
import { EntryVersion } from '#api/entities/entry-version.ts';
import { versionsOf, type PublicVersion } from './public-entries.ts';

export interface FrozenVersion extends PublicVersion {
  row: EntryVersion;
}

/** Adds the stored rows to public versions, in their order. */
export const withRows = async (em: EntityManager, versions: readonly PublicVersion[]): Promise<FrozenVersion[]> => {
  const rows = await em.find(EntryVersion, { id: { $in: versions.map((v) => v.id) } }, { populate: ['device.organisation', 'organisation'] });
  const byId = new Map(rows.map((row) => [row.id, row]));
  return versions.flatMap((version) => {
    const row = byId.get(version.id);
    return row ? [{ ...version, row }] : [];
  });
};

const none = (name: string): AppError => new AppError('not-found', `There is no public entry ${JSON.stringify(name.slice(0, 40))}.`);

/** The public versions of an accession, newest first; none is not-found. */
export const requireVersions = async (em: EntityManager, accession: string): Promise<[PublicVersion, ...PublicVersion[]]> => {
  const [first, ...others] = accessionPattern.test(accession) ? await versionsOf(em, accession) : [];
  if (!first) throw none(accession);
  return [first, ...others];
};

/** One public version by accession and number. */
export const requireVersion = async (em: EntityManager, accession: string, version: number): Promise<PublicVersion> => {
  const found = (await requireVersions(em, accession)).find((v) => v.version === version);
  if (!found) throw none(`${accession}.${version}`);
  return found;
};
