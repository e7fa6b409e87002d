import type { EntityManager } from '@mikro-orm/postgresql';
import type { Request } from 'express';
import { interestMonths } from '#shared/domain/rules.ts';
import { AppError } from '#shared/errors/app-error.ts';
import { ApiToken } from '#api/entities/api-token.ts';
import { Membership } from '#api/entities/membership.ts';
import { RoleGrant } from '#api/entities/role-grant.ts';
import { User } from '#api/entities/user.ts';
import { stranger, type Caller } from '#api/lib/caller.ts';
import type { Clock } from '#api/lib/clock.ts';
import { secretSha256 } from '#api/lib/secrets.ts';

const monthsBefore = (instant: Date, months: number): Date => {
  const earlier = new Date(instant);
  earlier.setUTCMonth(earlier.getUTCMonth() - months);
  return earlier;
};

const openAt = (now: Date) => ({ since: { $lte: now }, $or: [{ until: null }, { until: { $gt: now } }] });

/** The caller that a person's roles at this instant make. Null for an unknown or disabled person. */
export const callerOf = async (em: EntityManager, userId: string, now: Date, csrfToken: string): Promise<Caller | null> => {
  const user = await em.findOne(User, { id: userId, disabledAt: null });
  if (!user) return null;
  const memberships = await em.find(Membership, { user: userId, since: { $lte: now } }, { populate: ['organisation'], orderBy: { since: 'asc', id: 'asc' } });
  const grants = await em.find(RoleGrant, { user: userId, ...openAt(now) });
  const interestFrom = monthsBefore(now, interestMonths);
  const current = memberships.filter(({ until }) => until === null || until === undefined || until > now);
  return {
    asker: {
      signedIn: true,
      isCurator: grants.some((grant) => grant.role === 'curator'),
      isSteward: grants.some((grant) => grant.role === 'steward'),
      viaToken: false,
      contributorOf: current.filter(({ role }) => role === 'contributor').map(({ organisation }) => organisation.id),
      interestIn: memberships.filter(({ until }) => !until || until > interestFrom).map(({ organisation }) => organisation.id),
    },
    user: { id: user.id, name: user.name, email: user.email },
    token: null,
    organisations: current.map(({ organisation, role }) => ({ id: organisation.id, name: organisation.$.name, kind: organisation.$.kind, role })),
    csrfToken,
  };
};

const lastUseResolutionMs = 60_000;

const callerOfToken = async (em: EntityManager, secret: string, now: Date): Promise<Caller> => {
  const token = await em.findOne(ApiToken, { sha256: secretSha256(secret), revokedAt: null }, { populate: ['organisation'] });
  if (!token || (token.expiresAt && token.expiresAt <= now)) throw new AppError('not-signed-in', 'The API token is not valid: it is unknown, revoked, or has run out.');
  if (!token.lastUsedAt || now.getTime() - token.lastUsedAt.getTime() > lastUseResolutionMs) await em.nativeUpdate(ApiToken, { id: token.id }, { lastUsedAt: now });
  const organisation = token.organisation;
  return {
    ...stranger,
    asker: { ...stranger.asker, viaToken: true, contributorOf: [organisation.id], interestIn: [organisation.id] },
    token: { id: token.id, organisation: organisation.id },
    organisations: [{ id: organisation.id, name: organisation.$.name, kind: organisation.$.kind, role: 'contributor' }],
  };
};

/** Who is asking: a bearer token if one is given, else the session's person, else a stranger. */
export const findCaller = async (request: Request, em: EntityManager, clock: Clock): Promise<Caller> => {
  const authorization = request.get('authorization');
  if (authorization !== undefined) {
    const secret = /^Bearer ([\w-]{20,200})$/i.exec(authorization)?.[1];
    if (!secret) throw new AppError('not-signed-in', 'The Authorization header must read "Bearer " and an API token.');
    return callerOfToken(em, secret, clock.now());
  }
  const userId = request.session?.passport?.user;
  if (!userId) return stranger;
  return (await callerOf(em, userId, clock.now(), request.session.csrf ?? '')) ?? stranger;
};
