import { z } from 'zod';
import { pageQuery } from '#shared/contracts/common.ts';
import { runSheetCreate, runSheetList, runSheetView } from '#shared/contracts/run-sheets.ts';
import { AppError } from '#shared/errors/app-error.ts';
import { RunSheet } from '#api/entities/run-sheet.ts';
import { pageFrom, readTimeCursor } from '#api/lib/cursor.ts';
import { defineRoute, type Route } from '#api/lib/define-route.ts';
import { fingerprintOf, idempotently, readIdempotencyKey } from '#api/lib/idempotent.ts';
import { bytes, reply } from '#api/lib/reply.ts';
import { workOf } from '#api/lib/work-of.ts';
import { listOrganisations } from '#api/modules/devices/owner.ts';
import { streamBytes } from '#api/modules/submissions/file-store.ts';
import { presentRunSheet, usersOf } from './presenter.ts';
import { createRunSheet, findDeviceById, findRunSheet } from './service.ts';

const one = z.object({ id: z.string().max(20) });
const populate = ['device.organisation', 'createdBy'] as const;

export const runSheetRoutes: Route[] = [
  defineRoute({
    method: 'get',
    path: '/api/v1/run-sheets',
    action: 'run-sheet.list',
    summary: 'The run sheets of an organisation, newest first; of all the caller contributes to where none is named.',
    query: pageQuery.extend({ organisation: z.string().max(64).optional() }),
    response: runSheetList,
    load: async ({ em, query, caller }) => listOrganisations(em, query.organisation, caller),
    handler: async ({ em, query, loaded }) => {
      const after = readTimeCursor(query.cursor);
      const rows = await em.find(
        RunSheet,
        { organisation: { $in: loaded.organisations }, ...(after ? { $or: [{ createdAt: { $lt: after.at } }, { createdAt: after.at, id: { $lt: after.id } }] } : {}) },
        { orderBy: { createdAt: 'desc', id: 'desc' }, limit: query.limit + 1, populate },
      );
      const users = await usersOf(em, rows);
      return pageFrom(rows, query.limit, (s) => [s.createdAt.toISOString(), s.id], (s) => presentRunSheet(s, users.get(s.id) ?? null));
    },
  }),
  defineRoute({
    method: 'post',
    path: '/api/v1/run-sheets',
    action: 'run-sheet.create',
    summary: 'Asks for a run sheet of a device; the registry draws it as a job with progress.',
    body: runSheetCreate,
    response: runSheetView,
    status: 202,
    load: async ({ em, body }) => {
      const device = await findDeviceById({ em }, body.device);
      return { thing: { owner: device.organisation.id } };
    },
    handler: async (scope) => {
      const { body, header } = scope;
      const key = readIdempotencyKey(header('idempotency-key'), false);
      return idempotently(workOf(scope), { key, fingerprint: fingerprintOf('POST', 'run-sheets', JSON.stringify(body)) }, async (work) => {
        const { id } = await createRunSheet(work, body);
        const sheet = await findRunSheet(work, id);
        return reply(presentRunSheet(sheet, null), { status: 202, headers: { location: `/api/v1/run-sheets/${sheet.id}` } });
      });
    },
  }),
  defineRoute({
    method: 'get',
    path: '/api/v1/run-sheets/:id',
    action: 'run-sheet.read',
    summary: 'A run sheet: how far its drawing is, what was drawn, which submission uses it.',
    params: one,
    response: runSheetView,
    load: async ({ em, params }) => {
      const sheet = await findRunSheet({ em }, params.id);
      return { thing: { owner: sheet.organisation.id }, sheet };
    },
    handler: async ({ em, loaded }) => presentRunSheet(loaded.sheet, (await usersOf(em, [loaded.sheet])).get(loaded.sheet.id) ?? null),
  }),
  defineRoute({
    method: 'get',
    path: '/api/v1/run-sheets/:id/file',
    action: 'run-sheet.read',
    summary: 'The sheet as a file. Its SHA-256 is what a dataset names.',
    params: one,
    produces: ['application/json'],
    load: async ({ em, params }) => {
      const sheet = await findRunSheet({ em }, params.id);
      return { thing: { owner: sheet.organisation.id }, sheet };
    },
    handler: async ({ em, loaded }) => {
      const { id, state, sheetSha256 } = loaded.sheet;
      if (state !== 'drawn') throw new AppError('wrong-state', `${id} is not drawn yet: its state is "${state}".`);
      return bytes(streamBytes(em, 'sheet', id), 'application/json', { headers: { etag: `"${sheetSha256}"`, 'content-disposition': `attachment; filename="${id}.json"` } });
    },
  }),
];
