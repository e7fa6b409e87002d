import { ApiToken } from '#api/entities/api-token.ts';
import { AppError } from '#shared/errors/app-error.ts';
import type { Work } from './work.ts';

/** Who moves something, as rows keep it. A token acts for the person who made it and is named beside. */
export interface Actor {
  userId: string;
  name: string;
}

/** The person or token behind the work; null for the registry itself. */
export const actorOf = async ({ em, caller }: Work): Promise<Actor | null> => {
  if (caller?.user) return { userId: caller.user.id, name: caller.user.name };
  if (!caller?.token) return null;
  const token = await em.findOneOrFail(ApiToken, { id: caller.token.id }, { populate: ['createdBy'] });
  return { userId: token.createdBy.id, name: `${token.createdBy.$.name}, by API token “${token.name}”` };
};

/** The same where somebody must stand behind it. */
export const requireActor = async (work: Work): Promise<Actor> => {
  const actor = await actorOf(work);
  if (!actor) throw new AppError('not-signed-in', 'This is open only to people who are signed in, or to an API token.');
  return actor;
};
