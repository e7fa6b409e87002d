import { z } from 'zod';
import { board, boardDifference, boardList, boardQuery, differenceQuery } from '#shared/contracts/boards.ts';
import { gateClassById } from '#shared/domain/gate-classes.ts';
import { AppError } from '#shared/errors/app-error.ts';
import type { GateClass } from '#shared/formats/types.ts';
import { defineRoute, type Route } from '#api/lib/define-route.ts';
import { readDifference } from './difference.ts';
import { listBoards, readBoard } from './service.ts';

const params = z.object({ class: z.string().max(60), version: z.string().max(12) });

const classOf = (named: z.infer<typeof params>): GateClass => {
  const id = `${named.class}/${named.version}`;
  const gateClass = gateClassById(id);
  if (!gateClass) throw new AppError('not-found', `There is no gate class ${JSON.stringify(id)}.`);
  return gateClass;
};

export const boardRoutes: Route[] = [
  defineRoute({
    method: 'get',
    path: '/api/v1/boards',
    action: 'public.read',
    summary: 'The boards with how many entries each has, how many of them are taken on equal terms, and who may be first.',
    response: boardList,
    handler: async ({ em, deps }) => ({ items: await listBoards(em, deps.threads.run), nextCursor: null }),
  }),
  defineRoute({
    method: 'get',
    path: '/api/v1/boards/:class/:version',
    action: 'public.read',
    summary: 'The board of a gate class: rows by estimate with their joint rank ranges, and the entries not listed with the reasons.',
    params,
    query: boardQuery,
    response: board,
    handler: async ({ em, params: named, query, deps }) => readBoard(em, deps.threads.run, classOf(named), query, deps.clock.now()),
  }),
  defineRoute({
    method: 'get',
    path: '/api/v1/boards/:class/:version/difference',
    action: 'public.read',
    summary: 'The difference of two entries of a board by one figure, with its own interval and the share of replicates in which the first is better.',
    params,
    query: differenceQuery,
    response: boardDifference,
    handler: async ({ em, params: named, query, deps }) => readDifference(em, classOf(named), query, deps.clock.now()),
  }),
];
