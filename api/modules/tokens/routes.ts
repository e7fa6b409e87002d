import { z } from 'zod';
import { tokenCreate, tokenCreated, tokenList, type TokenView } from '#shared/contracts/session.ts';
import { ApiToken } from '#api/entities/api-token.ts';
import { defineRoute, type Route } from '#api/lib/define-route.ts';
import { reply } from '#api/lib/reply.ts';
import { workOf } from '#api/lib/work-of.ts';
import { findOrganisation } from '#api/modules/devices/owner.ts';
import { createToken, findToken, revokeToken } from './service.ts';

const present = (token: ApiToken): TokenView => ({
  id: token.id,
  name: token.name,
  organisation: token.organisation.id,
  createdBy: token.createdBy.unwrap().name,
  createdAt: token.createdAt.toISOString(),
  lastUsedAt: token.lastUsedAt?.toISOString() ?? null,
  hint: token.prefix,
});

export const tokenRoutes: Route[] = [
  defineRoute({
    method: 'get',
    path: '/api/v1/tokens',
    action: 'token.list',
    summary: 'The valid API tokens of an organisation; their secrets are not kept.',
    query: z.object({ organisation: z.string().max(64) }),
    response: tokenList,
    load: async ({ em, query }) => {
      const organisation = await findOrganisation(em, query.organisation);
      return { thing: { owner: organisation.id } };
    },
    handler: async ({ em, loaded }) => {
      const tokens = await em.find(ApiToken, { organisation: loaded.thing.owner, revokedAt: null }, { populate: ['createdBy'], orderBy: { createdAt: 'desc', id: 'asc' } });
      return { items: tokens.map(present), nextCursor: null };
    },
  }),
  defineRoute({
    method: 'post',
    path: '/api/v1/tokens',
    action: 'token.create',
    summary: 'Makes an API token for an organisation. The secret is in this answer and nowhere else.',
    body: tokenCreate,
    response: tokenCreated,
    status: 201,
    load: async ({ em, body }) => {
      const organisation = await findOrganisation(em, body.organisation);
      return { thing: { owner: organisation.id }, organisation };
    },
    handler: async (scope) => {
      const { token, secret } = await createToken(workOf(scope), { organisation: scope.loaded.organisation.id, name: scope.body.name });
      return reply({ ...present(token), secret }, { status: 201 });
    },
  }),
  defineRoute({
    method: 'delete',
    path: '/api/v1/tokens/:id',
    action: 'token.revoke',
    summary: 'Revokes an API token.',
    params: z.object({ id: z.uuid() }),
    load: async ({ em, params }) => {
      const token = await findToken({ em }, params.id);
      return { thing: { owner: token.organisation.id } };
    },
    handler: async (scope) => revokeToken(workOf(scope), scope.params.id),
  }),
];
