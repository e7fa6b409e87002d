import type { EntityManager } from '@mikro-orm/postgresql';
import { ApiToken } from '#api/entities/api-token.ts';
import { Membership } from '#api/entities/membership.ts';
import { Organisation } from '#api/entities/organisation.ts';
import { RoleGrant } from '#api/entities/role-grant.ts';
import { User } from '#api/entities/user.ts';
import { newSecret, secretSha256 } from '#api/lib/secrets.ts';

const since = new Date('2025-01-06T09:00:00Z');
let serial = 0;
const next = (): number => (serial += 1);

/** Factories: each makes rows that are valid by themselves; a test names only what it is about. */
export const makeUser = async (em: EntityManager, given: Partial<Pick<User, 'name' | 'email'>> = {}): Promise<User> => {
  const n = next();
  const user = em.create(User, { subject: `subject-${n}`, email: `person-${n}@evenbeam.example`, name: `Person ${n}`, createdAt: since, lastSignInAt: null, disabledAt: null, ...given });
  await em.flush();
  return user;
};

export const makeOrganisation = async (em: EntityManager, given: Partial<Pick<Organisation, 'name' | 'kind'>> = {}): Promise<Organisation> => {
  const n = next();
  const organisation = em.create(Organisation, { slug: `organisation-${n}`, name: `Organisation ${n}`, kind: 'provider', createdAt: since, ...given });
  await em.flush();
  return organisation;
};

export const addMember = async (em: EntityManager, user: User, organisation: Organisation, given: Partial<Pick<Membership, 'role' | 'since' | 'until'>> = {}): Promise<Membership> => {
  const membership = em.create(Membership, { user, organisation, role: 'contributor', since, until: null, ...given });
  await em.flush();
  return membership;
};

export const grantRole = async (em: EntityManager, user: User, role: RoleGrant['role']): Promise<void> => {
  em.create(RoleGrant, { user, role, since, until: null });
  await em.flush();
};

export const makeContributor = async (em: EntityManager, organisation?: Organisation): Promise<{ user: User; organisation: Organisation }> => {
  const home = organisation ?? (await makeOrganisation(em));
  const user = await makeUser(em);
  await addMember(em, user, home);
  return { user, organisation: home };
};

export const makeCurator = async (em: EntityManager): Promise<User> => {
  const user = await makeUser(em);
  await grantRole(em, user, 'curator');
  return user;
};

export const makeSteward = async (em: EntityManager): Promise<User> => {
  const user = await makeUser(em);
  await grantRole(em, user, 'steward');
  return user;
};

/** An API token of an organisation; gives the secret. */
export const makeToken = async (em: EntityManager, organisation: Organisation, createdBy: User, given: Partial<Pick<ApiToken, 'expiresAt' | 'revokedAt'>> = {}): Promise<string> => {
  const secret = newSecret('evb_');
  em.create(ApiToken, { organisation, createdBy, name: 'script', prefix: secret.slice(0, 8), sha256: secretSha256(secret), createdAt: since, expiresAt: null, lastUsedAt: null, revokedAt: null, ...given });
  await em.flush();
  return secret;
};
