import { z } from 'zod';
import { methodList, versionResults } from '#shared/contracts/methods.ts';
import { defineRoute, type Route } from '#api/lib/define-route.ts';
import { listResults, readResult } from './results.ts';
import { listMethods } from './service.ts';

const versionParams = z.object({ accession: z.string().max(20), version: z.coerce.number().int().min(1).max(1_000_000) });
const resultParams = versionParams.extend({ method: z.string().regex(/^M[1-9][0-9]{0,3}$/, 'must be the name of a method version, such as M1') });

export const methodRoutes: Route[] = [
  defineRoute({
    method: 'get',
    path: '/api/v1/methods',
    action: 'public.read',
    summary: 'The method versions of this registry, official ones and drafts, with how many public results each has.',
    response: methodList,
    handler: async ({ em }) => ({ items: await listMethods(em), nextCursor: null }),
  }),
  defineRoute({
    method: 'get',
    path: '/api/v1/entries/:accession/v/:version/results',
    action: 'public.read',
    summary: 'Every result of a version: the frozen one, and those added later by other method versions.',
    params: versionParams,
    response: versionResults,
    handler: async ({ em, params }) => ({ items: await listResults(em, params.accession, params.version), nextCursor: null }),
  }),
  defineRoute({
    method: 'get',
    path: '/api/v1/entries/:accession/v/:version/results/:method',
    action: 'public.read',
    summary: 'The result by one method version in its RFC 8785 form.',
    params: resultParams,
    produces: ['application/json'],
    handler: async ({ em, params, header }) => readResult(em, params.accession, params.version, params.method, 'result', header('if-none-match')),
  }),
  defineRoute({
    method: 'get',
    path: '/api/v1/entries/:accession/v/:version/results/:method/replicates',
    action: 'public.read',
    summary: 'The replicates by one method version: figures by replicates, row-major, float64 little-endian.',
    params: resultParams,
    produces: ['application/octet-stream'],
    handler: async ({ em, params, header }) => readResult(em, params.accession, params.version, params.method, 'replicates', header('if-none-match')),
  }),
];
