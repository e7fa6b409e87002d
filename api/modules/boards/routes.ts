import { z } from 'zod';
import { board, boardList, boardQuery } from '#shared/contracts/boards.ts';
import { gateClassById } from '#shared/domain/gate-classes.ts';
import { AppError } from '#shared/errors/app-error.ts';
import { defineRoute, type Route } from '#api/lib/define-route.ts';
import { listBoards, readBoard } from './service.ts';

export const boardRoutes: Route[] = [
  defineRoute({
    method: 'get',
    path: '/api/v1/boards',
    action: 'public.read',
    summary: 'The boards with how many entries each has and how many of them are taken on equal terms.',
    response: boardList,
    handler: async ({ em }) => ({ items: await listBoards(em), nextCursor: null }),
  }),
  defineRoute({
    method: 'get',
    path: '/api/v1/boards/:class/:version',
    action: 'public.read',
    summary: 'The board of a gate class: rows by estimate, and the entries not listed with the reasons.',
    params: z.object({ class: z.string().max(60), version: z.string().max(12) }),
    query: boardQuery,
    response: board,
    handler: async ({ em, params, query, deps }) => {
      const id = `${params.class}/${params.version}`;
      const gateClass = gateClassById(id);
      if (!gateClass) throw new AppError('not-found', `There is no gate class ${JSON.stringify(id)}.`);
      return readBoard(em, gateClass, query, deps.clock.now());
    },
  }),
];
