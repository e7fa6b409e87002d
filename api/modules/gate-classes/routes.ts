import { gateClassList } from '#shared/contracts/gate-classes.ts';
import { gateClasses } from '#shared/domain/gate-classes.ts';
import { defineRoute, type Route } from '#api/lib/define-route.ts';
import { presentGateClass } from './presenter.ts';

export const gateClassRoutes: Route[] = [
  defineRoute({
    method: 'get',
    path: '/api/v1/gate-classes',
    action: 'public.read',
    summary: 'The gate classes with what each asks for; a class with its bench circuits lies at its href.',
    response: gateClassList,
    handler: async () => ({ items: gateClasses.map(presentGateClass), nextCursor: null }),
  }),
];
