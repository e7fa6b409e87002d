import { z } from 'zod';
import { device, deviceCreate, deviceList, deviceSummary } from '#shared/contracts/devices.ts';
import { AppError } from '#shared/errors/app-error.ts';
import { Device } from '#api/entities/device.ts';
import { defineRoute, type Route } from '#api/lib/define-route.ts';
import { reply } from '#api/lib/reply.ts';
import { workOf } from '#api/lib/work-of.ts';
import { presentHistory, publicCounts } from './history.ts';
import { findOrganisation } from './owner.ts';
import { presentDevice } from './presenter.ts';
import { createDevice } from './service.ts';

export const deviceRoutes: Route[] = [
  defineRoute({
    method: 'get',
    path: '/api/v1/devices',
    action: 'device.list-own',
    summary: 'The devices of an organisation, those without an entry among them.',
    query: z.object({ organisation: z.string().max(64) }),
    response: deviceList,
    load: async ({ em, query }) => {
      const organisation = await findOrganisation(em, query.organisation);
      return { thing: { owner: organisation.id } };
    },
    handler: async ({ em, loaded }) => {
      const devices = await em.find(Device, { organisation: loaded.thing.owner }, { populate: ['organisation'], orderBy: { name: 'asc' } });
      const counts = await publicCounts(em, devices.map((d) => d.id));
      return { items: devices.map((d) => ({ ...presentDevice(d), ...(counts.get(d.id) ?? { entries: 0, lastEntryAt: null }) })), nextCursor: null };
    },
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
      return reply({ ...presentDevice(made), entries: 0, lastEntryAt: null }, { status: 201, headers: { location: `/api/v1/devices/${made.id}` } });
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
