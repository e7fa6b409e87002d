import { beforeAll, describe, expect, it } from 'vitest';
import { lastDay } from '#api/demo/acts/script.ts';
import { foresee } from '#api/demo/foresight/foresee.ts';
import { ordersOf } from '#api/demo/foresight/orders.ts';
import { seedDemo } from '#api/demo/seed.ts';
import { Submission } from '#api/entities/submission.ts';
import { registerPeople } from '#api/fakes/register-people.ts';
import { runSql } from '#api/lib/run-sql.ts';
import { demoExcerpt } from '#tests/support/demo-excerpt.ts';
import { testConfig } from '#tests/support/test-app.ts';
import { useTestDatabase } from '#tests/support/test-database.ts';

const database = useTestDatabase();
const rows = <Row extends object>(sql: string): Promise<Row[]> => runSql<Row>(database().orm.em.fork(), sql);
const told: { words: string; share: number }[] = [];

const seed = (progress: (words: string, share: number) => void, stories = demoExcerpt): Promise<void> => seedDemo({ config: testConfig(database().url, { LOG_LEVEL: 'silent' }), progress, told: stories, now: lastDay });

beforeAll(async () => {
  await registerPeople(database().orm.em.fork(), new Date('2024-01-08T09:00:00Z'));
});

describe('an interrupted demo', () => {
  it('leaves nothing behind', async () => {
    const one = demoExcerpt.filter(({ end }) => end.kind === 'checking' || end.kind === 'blocked');
    const interrupt = (words: string): void => {
      if (words.startsWith('Reviewing')) throw new Error('interrupted');
    };
    await expect(seed(interrupt, one)).rejects.toThrow('interrupted');
    for (const table of ['device', 'run_sheet', 'submission', 'submission_file', 'audit_event', 'mail_outbox', 'pgboss.job']) {
      expect(await rows<{ n: string }>(`select count(*)::text as n from ${table}`), table).toEqual([{ n: '0' }]);
    }
  });
});

describe('the demo registry', () => {
  beforeAll(async () => {
    await seed((words, share) => void told.push({ words, share }));
  }, 300_000);

  it('tells how far it is, in words and as a share that only grows, from 0 to 1', () => {
    const shares = told.map(({ share }) => share);
    expect(shares).toEqual([...shares].sort((a, b) => a - b));
    expect([shares[0], shares.at(-1)]).toEqual([0, 1]);
    const files = demoExcerpt.length + demoExcerpt.filter(({ end }) => end.kind === 'run-again').length;
    expect(told.map(({ words }) => words)).toContain(`Estimating ${files} of ${files}`);
  });

  it('has submissions in every state in which one can rest', async () => {
    const found = await rows<{ state: string; n: number }>('select state, count(*)::int as n from submission group by state order by state');
    expect(Object.fromEntries(found.map(({ state, n }) => [state, n]))).toEqual({ blocked: 1, cancelled: 1, checking: 1, declined: 1, embargoed: 1, frozen: 3, 'in-review': 1, ready: 1, returned: 1, superseded: 1 });
  });

  it('marks everything as demo', async () => {
    expect(await rows('select id from submission where not demo union select accession from entry_version where not demo')).toEqual([]);
  });

  it('names entries in the order in which they were accepted, and versions under one accession', async () => {
    const versions = await rows<{ accession: string; version: number; device_id: string }>('select accession, version, device_id from entry_version order by accepted_at');
    expect(versions.map(({ accession, version, device_id }) => `${accession}.${version} ${device_id}`)).toEqual([
      'EVB-000001.1 larkspur-quantics-meadow-5', 'EVB-000002.1 pellmere-instruments-weir-11', 'EVB-000003.1 saltmarsh-atoms-marl-4', 'EVB-000003.2 saltmarsh-atoms-marl-4', 'EVB-000004.1 fellside-ion-works-tarn-1',
    ]);
  });

  it('keeps the trail in the order of time, within the two years', async () => {
    const [trail] = await rows<{ sorted: boolean; first: string; last: string }>('select bool_and(ordered) as sorted, min(at)::text as first, max(at)::text as last from (select at, at >= lag(at, 1, at) over (order by id) as ordered from audit_event) t');
    expect(trail?.sorted).toBe(true);
    expect(String(trail?.first).slice(0, 7)).toBe('2024-12');
    expect(String(trail?.last).slice(0, 7)).toBe('2026-11');
  });

  it('estimates every file with the official 2 000 replicates', async () => {
    expect(await rows('select distinct replicate_count as n from submission_estimate')).toEqual([{ n: 2000 }]);
  });

  it('shows the drift of the run that was returned, and none in the run that took its place', async () => {
    const found = await rows<{ round: number; sigmas: number }>(
      "select e.round, (e.summary #>> '{patches,0,misfit,sigmas}')::float8 as sigmas from submission_estimate e join submission s on s.id = e.submission_id where s.device_id = 'pellmere-instruments-weir-11' order by e.round");
    expect(found[0]?.sigmas).toBeGreaterThan(2.58);
    expect(Math.abs(found[1]?.sigmas ?? NaN)).toBeLessThan(2.58);
  });

  it('leaves the worker one job, a day ahead, for the dataset that rests at "checking", and no mail to deliver', async () => {
    expect(await rows("select name, start_after > now() + interval '23 hours' as later from pgboss.job where state < 'completed' and name <> 'opinions'")).toEqual([{ name: 'estimate', later: true }]);
    // Second opinions are made by the worker once the demo is there: one job for each that is owed.
    expect(await rows("select count(*) > 0 as some from second_opinion where state = 'waiting'")).toEqual([{ some: true }]);
    expect(await rows("select estimate_id from second_opinion where not exists (select 1 from pgboss.job where name = 'opinions' and data ->> 'estimate' = estimate_id::text)")).toEqual([]);
    expect(await rows('select id from mail_outbox where sent_at is null')).toEqual([]);
  });

  it('has no decision by a curator with an interest, and a reason for each', async () => {
    expect(await rows("select d.id from decision d join submission s on s.id = d.submission_id join membership m on m.user_id = d.curator_id and m.organisation_id = s.organisation_id")).toEqual([]);
    expect(await rows('select id from decision where length(reason) < 20')).toEqual([]);
  });

  it('measures the same counts each time', async () => {
    const resting = demoExcerpt.filter(({ end }) => end.kind === 'checking');
    const stored = await database().orm.em.fork().findOneOrFail(Submission, { state: 'checking' }, { populate: ['runSheet'] });
    const [order] = ordersOf(resting, Number(stored.runSheet?.id.slice(3)));
    if (!order) throw new Error('no order');
    const again = await foresee([order], () => undefined);
    const [file] = await rows<{ bytes: Buffer }>(`select bytes from submission_file where submission_id = '${stored.id}'`);
    expect(Buffer.from(again.get(order.key)?.runs[0]?.bytes ?? []).equals(file?.bytes ?? Buffer.alloc(0))).toBe(true);
  });
});
