import type { EntityManager } from '@mikro-orm/postgresql';
import { AppError } from '#shared/errors/app-error.ts';
import { Organisation } from '#api/entities/organisation.ts';
import type { Caller } from '#api/lib/caller.ts';

const uuid = /^[0-9a-f]{8}(-[0-9a-f]{4}){3}-[0-9a-f]{12}$/;

/** An organisation by its id or its short name, as requests name it. */
export const findOrganisation = async (em: EntityManager, name: string): Promise<Organisation> => {
  const organisation = await em.findOne(Organisation, uuid.test(name) ? { id: name } : { slug: name });
  if (!organisation) throw new AppError('not-found', `There is no organisation ${JSON.stringify(name.slice(0, 80))}.`);
  return organisation;
};

/** Which organisations a list is about: the one named, or all that the caller contributes to. The rule is judged on the one named. */
export const listOrganisations = async (em: EntityManager, named: string | undefined, caller: Caller): Promise<{ thing: { owner: string | null }; organisations: string[] }> => {
  if (named === undefined) return { thing: { owner: null }, organisations: [...caller.asker.contributorOf] };
  const { id } = await findOrganisation(em, named);
  return { thing: { owner: id }, organisations: [id] };
};
