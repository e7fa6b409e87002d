import { z } from 'zod';
import { logConsistency, logConsistencyQuery, logGrowth, logHead, logHeadQuery, logLeafList, logLeafQuery, logProof, logProofQuery } from '#shared/contracts/log.ts';
import { defineRoute, type Route } from '#api/lib/define-route.ts';
import { listLeaves, readConsistency, readGrowth, readHead, readProof } from './service.ts';

export const logRoutes: Route[] = [
  defineRoute({
    method: 'get',
    path: '/api/v1/log/head',
    action: 'public.read',
    summary: 'The newest signed head of the log, or an earlier one by its number of leaves.',
    query: logHeadQuery,
    response: logHead,
    handler: async ({ em, query }) => readHead(em, query.size ?? null),
  }),
  defineRoute({
    method: 'get',
    path: '/api/v1/log/consistency',
    action: 'public.read',
    summary: 'The proof that the log of second leaves begins with the log of first leaves.',
    query: logConsistencyQuery,
    response: logConsistency,
    handler: async ({ em, query }) => readConsistency(em, query.first, query.second),
  }),
  defineRoute({
    method: 'get',
    path: '/api/v1/log/leaves',
    action: 'public.read',
    summary: 'All leaves of the log in order, so that anyone can build the tree.',
    query: logLeafQuery,
    response: logLeafList,
    handler: async ({ em, query }) => listLeaves(em, query.order, query.limit, query.cursor),
  }),
  defineRoute({
    method: 'get',
    path: '/api/v1/log/growth',
    action: 'public.read',
    summary: 'How the log grew, month by month (UTC).',
    response: logGrowth,
    handler: async ({ em }) => readGrowth(em),
  }),
  defineRoute({
    method: 'get',
    path: '/api/v1/entries/:accession/v/:version/proof',
    action: 'public.read',
    summary: 'The proof that a version is in the log, against the newest head.',
    params: z.object({ accession: z.string().max(20), version: z.coerce.number().int().min(1).max(1_000_000) }),
    query: logProofQuery,
    response: logProof,
    handler: async ({ em, params, query }) => readProof(em, params.accession, params.version, query.event),
  }),
];
