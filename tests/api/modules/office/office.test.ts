import { beforeAll, describe, expect, it, vi } from 'vitest';
import { AuditEvent } from '#api/entities/audit-event.ts';
import { defineJob } from '#api/jobs/define-job.ts';
import { queueNames } from '#api/jobs/queue-names.ts';
import { startWorker } from '#api/jobs/start-worker.ts';
import { jobsOverview, mailOverview, peopleOverview, type JobsOverview } from '#shared/contracts/office.ts';
import { makeStewardClient } from '#tests/support/campaigns.ts';
import { addMember, grantRole, makeOrganisation, makeUser } from '#tests/support/people.ts';
import type { Client } from '#tests/support/sign-in.ts';
import { useTestApp } from '#tests/support/test-app.ts';

const app = useTestApp({ faultsExpected: true });
let steward: Client;
const jobs = async (): Promise<JobsOverview> => jobsOverview.parse((await steward('get', '/api/v1/jobs')).body);
const soon = { timeout: 60_000, interval: 50 };

beforeAll(async () => {
  steward = await makeStewardClient(app());
});

describe('the job queue', () => {
  it('is told by queue and state, every queue also when it is empty', async () => {
    await app().deps.queue.send('deliver-mail', {});
    await app().deps.queue.send('deliver-mail', {}, { startAfter: new Date(Date.now() + 86_400_000) });
    const { queues } = await jobs();
    expect(queues.map((q) => q.name)).toEqual(queueNames);
    expect(queues.find((q) => q.name === 'deliver-mail')).toEqual({ name: 'deliver-mail', waiting: 1, later: 1, running: 0, failed: 0 });
  });

  it('names a job that failed for good with its reason; another attempt is made once, and noted', async () => {
    await app().deps.pool.query("update pgboss.job set retry_limit = 0 where name = 'deliver-mail'");
    let away = true;
    const attempts: number[] = [];
    const mail = defineJob({ name: 'deliver-mail', handle: async ({ attempt }) => {
      attempts.push(attempt);
      if (away) throw new Error('the mail server is away');
    } });
    const worker = await startWorker(app().deps, [mail], { pollSeconds: 0.5 });
    await vi.waitFor(async () => expect((await jobs()).failed).toMatchObject([{ queue: 'deliver-mail', attempts: 1, reason: 'the mail server is away', retriable: true }]), soon);
    const id = (await jobs()).failed[0]!.id;
    away = false;
    expect((await steward('post', `/api/v1/jobs/deliver-mail/${id}/retry`)).status).toBe(204);
    await vi.waitFor(() => expect(attempts).toHaveLength(2), soon);
    await vi.waitFor(async () => expect((await jobs()).failed).toEqual([]), soon);
    await worker.stop();
    expect((await steward('post', `/api/v1/jobs/deliver-mail/${id}/retry`)).body).toMatchObject({ status: 409, code: 'wrong-state' });
    expect((await steward('post', '/api/v1/jobs/deliver-mail/11111111-1111-4111-8111-111111111111/retry')).body).toMatchObject({ status: 404, code: 'not-found' });
    expect(await app().deps.orm.em.fork().find(AuditEvent, { action: 'job.retry' })).toMatchObject([{ subjectId: id, actorKind: 'person', detail: { queue: 'deliver-mail' } }]);
  });

  it('does not try again what was answered with its submission', async () => {
    const id = await app().deps.queue.send('estimate', { submission: 'S-000001', round: 1 });
    await app().deps.pool.query("update pgboss.job set state = 'failed', completed_on = now(), output = '{\"message\": \"given up\"}' where id = $1", [id]);
    expect((await jobs()).failed).toMatchObject([{ id, queue: 'estimate', reason: 'given up', retriable: false }]);
    expect((await steward('post', `/api/v1/jobs/estimate/${id}/retry`)).body).toMatchObject({ status: 409, code: 'wrong-state' });
  });
});

describe('the outbox', () => {
  it('lists what is owed before what was sent, with the last fault and without the text', async () => {
    const add = (subject: string, sent: string, attempts: number, error: string | null): Promise<unknown> => app().deps.pool.query(`insert into mail_outbox values (gen_random_uuid(), 'ida@larkspur.example', $1, 'a private text', 'submission', 'S-000007', now(), ${sent}, $2, $3)`, [subject, attempts, error]);
    await add('sent', 'now()', 1, null);
    await add('stuck', 'null', 3, 'connection refused');
    const answer = await steward('get', '/api/v1/mail');
    const mail = mailOverview.parse(answer.body);
    expect(mail).toMatchObject({ waiting: 1, failing: 1, sent: 1, items: [{ subject: 'stuck', attempts: 3, lastError: 'connection refused', sentAt: null }, { subject: 'sent', lastError: null }] });
    expect(answer.text).not.toContain('a private text');
  });
});

describe('people and organisations', () => {
  it('stand with the roles they hold now, not with those that ended', async () => {
    const em = app().deps.orm.em.fork();
    const home = await makeOrganisation(em, { name: 'Larkspur Quantics' });
    const former = await makeOrganisation(em, { name: 'Fellside Ion Works' });
    const ida = await makeUser(em, { name: 'Ida Marsh' });
    await addMember(em, ida, home);
    await addMember(em, ida, former, { until: new Date('2026-01-31T00:00:00Z') });
    await grantRole(em, ida, 'curator');
    const { people, organisations } = peopleOverview.parse((await steward('get', '/api/v1/people')).body);
    expect(people.find((p) => p.name === 'Ida Marsh')).toMatchObject({ roles: ['curator'], memberships: [{ organisation: 'Larkspur Quantics', role: 'contributor' }], disabled: false });
    expect(organisations.map((o) => [o.name, o.members])).toEqual([['Fellside Ion Works', 0], ['Larkspur Quantics', 1]]);
  });
});
