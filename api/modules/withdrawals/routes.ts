import { z } from 'zod';
import { withdrawal, withdrawalAnswered, withdrawalAsked, withdrawalList } from '#shared/contracts/withdrawals.ts';
import { EntryVersion } from '#api/entities/entry-version.ts';
import { defineRoute, type Route, type Scope } from '#api/lib/define-route.ts';
import { reply } from '#api/lib/reply.ts';
import { workOf } from '#api/lib/work-of.ts';
import { requireVersion } from '#api/modules/entries/load.ts';
import { findWithdrawal, listWithdrawals } from './load.ts';
import { presentWithdrawal } from './presenter.ts';
import { answerWithdrawal, askWithdrawal } from './service.ts';

const versionParams = z.object({ accession: z.string().max(20), version: z.coerce.number().int().min(1).max(1_000_000) });

const loadVersion = async ({ em, params }: Pick<Scope<z.output<typeof versionParams>>, 'em' | 'params'>) => {
  const { id, state } = await requireVersion(em, params.accession, params.version);
  const row = await em.findOneOrFail(EntryVersion, { id }, { fields: ['organisation'] });
  return { thing: { owner: row.organisation.id, state } };
};

export const withdrawalRoutes: Route[] = [
  defineRoute({
    method: 'get',
    path: '/api/v1/withdrawals',
    action: 'withdrawal.list',
    summary: 'Withdrawals that wait for a second curator, and the newest answered ones.',
    response: withdrawalList,
    handler: async ({ em, caller }) => ({ items: (await listWithdrawals(em, [...caller.asker.interestIn])).map((row) => presentWithdrawal(row, caller)) }),
  }),
  defineRoute({
    method: 'post',
    path: '/api/v1/entries/:accession/v/:version/withdrawal',
    action: 'withdrawal.ask',
    summary: 'Asks that a version be withdrawn. It is, once another curator confirms.',
    params: versionParams,
    body: withdrawalAsked,
    response: withdrawal,
    status: 201,
    load: loadVersion,
    handler: async (scope) => {
      const id = await askWithdrawal(workOf(scope), scope.params, scope.body);
      return reply(presentWithdrawal(await findWithdrawal(scope.em.fork(), id), scope.caller), { status: 201, headers: { location: `/api/v1/withdrawals` } });
    },
  }),
  defineRoute({
    method: 'post',
    path: '/api/v1/withdrawals/:id/answer',
    action: 'withdrawal.answer',
    summary: 'Confirms a withdrawal asked for by another curator, or drops it.',
    params: z.object({ id: z.string().max(40) }),
    body: withdrawalAnswered,
    response: withdrawal,
    load: async ({ em, params }) => {
      const row = await findWithdrawal(em, params.id);
      return { thing: { owner: row.organisation.id, state: row.state } };
    },
    handler: async (scope) => presentWithdrawal(await answerWithdrawal(workOf(scope), scope.params.id, scope.body), scope.caller),
  }),
];
