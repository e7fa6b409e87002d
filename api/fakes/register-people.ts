import type { EntityManager } from '@mikro-orm/postgresql';
import { Membership } from '#api/entities/membership.ts';
import { Organisation } from '#api/entities/organisation.ts';
import { RoleGrant } from '#api/entities/role-grant.ts';
import { User } from '#api/entities/user.ts';
import { inventedOrganisations, inventedPeople, type InventedPerson } from './people.ts';

const registerPerson = async (em: EntityManager, given: InventedPerson, since: Date): Promise<void> => {
  if ((await em.count(User, { $or: [{ subject: given.subject }, { email: given.email }] })) > 0) return;
  const user = em.create(User, { subject: given.subject, email: given.email, name: given.name, createdAt: since, lastSignInAt: null, disabledAt: null });
  if (given.organisation && given.membership) {
    const organisation = await em.findOneOrFail(Organisation, { slug: given.organisation });
    em.create(Membership, { user, organisation, role: given.membership, since, until: null });
  }
  for (const role of given.roles) em.create(RoleGrant, { user, role, since, until: null });
};

/** Puts the invented people and their organisations on record, dated `since`. Those already there stay as they are. */
export const registerPeople = async (em: EntityManager, since: Date): Promise<void> =>
  em.transactional(async (tx) => {
    for (const organisation of inventedOrganisations) {
      if ((await tx.count(Organisation, { slug: organisation.slug })) === 0) tx.create(Organisation, { ...organisation, createdAt: since });
    }
    await tx.flush();
    for (const person of inventedPeople) await registerPerson(tx, person, since);
  });
