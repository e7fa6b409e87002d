import { health, type Health } from '#shared/contracts/health.ts';
import { defineRoute, type Route } from '#api/lib/define-route.ts';
import { reply } from '#api/lib/reply.ts';
import { methodVersions } from '#api/lib/method-versions.ts';

const answers = async (question: Promise<unknown>): Promise<'ok' | 'down'> => question.then((yes) => (yes ? 'ok' : 'down'), () => 'down' as const);

export const healthRoutes: Route[] = [
  defineRoute({
    method: 'get',
    path: '/api/health',
    action: 'public.read',
    summary: 'Whether the registry, its database and its job queue answer.',
    response: health,
    handler: async ({ em, deps }) => {
      const database = await answers(em.execute('select 1 as one'));
      const queue = await answers(deps.queue.isUp());
      const body: Health = { status: database === 'ok' && queue === 'ok' ? 'ok' : 'degraded', database, queue, methods: [...methodVersions] };
      return reply(body, { status: body.status === 'ok' ? 200 : 503, headers: { 'cache-control': 'no-store' } });
    },
  }),
];
