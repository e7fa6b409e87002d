import type { EntityManager } from '@mikro-orm/postgresql';
import type { PeopleOverview } from '#shared/contracts/office.ts';
import { EntryVersion } from '#api/entities/entry-version.ts';
import { Membership } from '#api/entities/membership.ts';
import { Organisation } from '#api/entities/organisation.ts';
import { RoleGrant } from '#api/entities/role-grant.ts';
import { User } from '#api/entities/user.ts';

/** People with the roles they hold now, and organisations with their members. */
export const readPeople = async (em: EntityManager, now: Date): Promise<PeopleOverview> => {
  const current = { since: { $lte: now }, $or: [{ until: null }, { until: { $gt: now } }] };
  const people = await em.find(User, {}, { orderBy: { name: 'asc', id: 'asc' } });
  const grants = await em.find(RoleGrant, current);
  const memberships = await em.find(Membership, current, { populate: ['organisation'] });
  const organisations = await em.find(Organisation, {}, { orderBy: { name: 'asc' } });
  const entries = await em.find(EntryVersion, { version: 1 }, { fields: ['organisation'] });
  return {
    people: people.map((person) => ({
      id: person.id, name: person.name, email: person.email, lastSignInAt: person.lastSignInAt?.toISOString() ?? null, disabled: Boolean(person.disabledAt),
      roles: grants.filter((g) => g.user.id === person.id).map((g) => g.role).sort(),
      memberships: memberships.filter((m) => m.user.id === person.id).map((m) => ({ organisation: m.organisation.unwrap().name, role: m.role })),
    })),
    organisations: organisations.map((o) => ({
      id: o.slug, name: o.name, kind: o.kind,
      members: new Set(memberships.filter((m) => m.organisation.id === o.id).map((m) => m.user.id)).size,
      entries: entries.filter((e) => e.organisation.id === o.id).length,
    })),
  };
};
