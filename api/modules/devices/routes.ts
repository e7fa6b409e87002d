import type { EntityManager, FilterQuery, QueryOrderMap } from '@mikro-orm/postgresql';
import { z } from 'zod';
import { pageQuery } from '#shared/contracts/common.ts';
import { device, deviceCreate, deviceList, deviceSummary, type DeviceSummary } from '#shared/contracts/devices.ts';
import { AppError } from '#shared/errors/app-error.ts';
import { Device } from '#api/entities/device.ts';
import { pageFrom, readCursor } from '#api/lib/cursor.ts';
import { defineRoute, type Route } from '#api/lib/define-route.ts';
import { reply } from '#api/lib/reply.ts';
import { workOf } from '#api/lib/work-of.ts';
import { devicesWithEntries, noCounts, presentHistory, publicCounts } from './history.ts';
import { findOrganisation } from './owner.ts';
import { presentDevice } from './presenter.ts';
import { createDevice } from './service.ts';

const summarise = async (em: EntityManager, which: FilterQuery<Device>, orderBy: QueryOrderMap<Device>): Promise<DeviceSummary[]> => {
  const devices = await em.find(Device, which, { populate: ['organisation'], orderBy });
  const counts = await publicCounts(em, devices.map((d) => d.id));
  return devices.map((d) => ({ ...presentDevice(d), ...(counts.get(d.id) ?? noCounts) }));
};

export const deviceRoutes: Route[] = [
  defineRoute({
    method: 'get',
    path: '/api/v1/devices',
    action: 'public.read',
    summary: 'Every device with a public entry, by its id.',
    query: pageQuery,
    response: deviceList,
    handler: async ({ em, query }) => {
      const [after = ''] = readCursor(query.cursor, 1) ?? [];
      const ids = await devicesWithEntries(em, after, query.limit + 1);
      const page = pageFrom(ids, query.limit, (id) => [id], (id) => id);
      return { items: await summarise(em, { id: { $in: page.items } }, { id: 'asc' }), nextCursor: page.nextCursor };
    },
  }),
  defineRoute({
    method: 'get',
    path: '/api/v1/organisations/:organisation/devices',
    action: 'device.list-own',
    summary: 'The devices of an organisation, those without an entry among them.',
    params: z.object({ organisation: z.string().max(64) }),
    response: deviceList,
    load: async ({ em, params }) => {
      const organisation = await findOrganisation(em, params.organisation);
      return { thing: { owner: organisation.id } };
    },
    handler: async ({ em, loaded }) => ({ items: await summarise(em, { organisation: loaded.thing.owner }, { name: 'asc' }), nextCursor: null }),
  }),
  defineRoute({
    method: 'post',
    path: '/api/v1/devices',
    action: 'device.create',
    summary: 'Registers a device of an organisation.',
    body: deviceCreate,
    response: deviceSummary,
    status: 201,
    load: async ({ em, body }) => {
      const organisation = await findOrganisation(em, body.organisation);
      return { thing: { owner: organisation.id }, organisation };
    },
    handler: async (scope) => {
      const made = await createDevice(workOf(scope), { organisation: scope.loaded.organisation.id, name: scope.body.name, modality: scope.body.modality });
      return reply({ ...presentDevice(made), ...noCounts }, { status: 201, headers: { location: `/api/v1/devices/${made.id}` } });
    },
  }),
  defineRoute({
    method: 'get',
    path: '/api/v1/devices/:id',
    action: 'public.read',
    summary: 'A device with its public entries, oldest first, each with its headline figure.',
    params: z.object({ id: z.string().max(120) }),
    response: device,
    handler: async ({ em, params }) => {
      const found = await em.findOne(Device, { id: params.id }, { populate: ['organisation'] });
      if (!found) throw new AppError('not-found', `There is no device ${JSON.stringify(params.id)}.`);
      return { ...presentDevice(found), ...(await presentHistory(em, found.id)) };
    },
  }),
];
