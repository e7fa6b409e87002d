import { me } from '#shared/contracts/session.ts';
import { defineRoute, type Route } from '#api/lib/define-route.ts';
import { presentMe } from './presenter.ts';
import { endAllSessions } from './service.ts';

export const sessionRoutes: Route[] = [
  defineRoute({
    method: 'get',
    path: '/api/v1/me',
    action: 'session.read',
    summary: 'Who is asking: the person, their roles and organisations, and the token to send back with changes.',
    response: me,
    handler: async ({ caller }) => presentMe(caller),
  }),
  defineRoute({
    method: 'post',
    path: '/auth/sign-out',
    action: 'session.end',
    summary: 'Ends this session.',
    handler: async ({ endSession }) => endSession(),
  }),
  defineRoute({
    method: 'post',
    path: '/auth/sign-out-everywhere',
    action: 'session.end',
    summary: 'Ends every session of the person, on all devices.',
    handler: async ({ em, caller, deps, requestId, endSession }) => {
      await endAllSessions(em, caller, deps.clock.now(), requestId);
      await endSession();
    },
  }),
];
