import request from 'supertest';
import { beforeAll, describe, expect, it } from 'vitest';
import { opinions } from '#shared/contracts/opinions.ts';
import { SecondOpinion } from '#api/entities/second-opinion.ts';
import { makeOpinions } from '#api/modules/opinions/make-opinions.ts';
import { accepted, estimated, inReview } from '#tests/support/life.ts';
import { makeDataset, makeDesk, makeDrawnSheet, workFor, type Desk } from '#tests/support/record.ts';
import { useTestApp } from '#tests/support/test-app.ts';

const app = useTestApp();
let desk: Desk;
beforeAll(async () => {
  desk = await makeDesk(app());
});

/** An estimate of the registry waits in the queue of every submission made through the services; it would hold the opinions up. */
const make = async (submission: string): Promise<void> => {
  await app().deps.pool.query("delete from pgboss.job where name = 'estimate'");
  const { estimateId } = await app().deps.orm.em.fork().findOneOrFail(SecondOpinion, { submissionId: submission });
  expect(await makeOpinions(await workFor(app(), null), estimateId)).toBe(true);
};

describe('second opinions by address', () => {
  it('curators read them once a submission is in review, waiting and done; contributors do not', async () => {
    const early = await estimated(app(), desk, makeDataset(desk, null));
    expect((await desk.curatorClient('get', `/api/v1/submissions/${early}/opinions`)).status).toBe(403);
    const id = await inReview(app(), desk, makeDataset(desk, await makeDrawnSheet(app(), desk)));
    const address = `/api/v1/submissions/${id}/opinions`;
    const waiting = await desk.curatorClient('get', address);
    expect(waiting.status).toBe(200);
    expect(opinions.parse(waiting.body)).toMatchObject({ state: 'waiting', method: 'M1', opinions: [] });
    await make(id);
    const done = opinions.parse((await desk.curatorClient('get', address)).body);
    expect(done).toMatchObject({ state: 'done', fraction: 1 });
    expect(done.opinions).toHaveLength(5);
    expect((await desk.client('get', address)).status).toBe(403);
  });

  it('of an entry they are public, and so is how far they are; an unknown version is not found', async () => {
    const { id, accession, version } = await accepted(app(), desk, makeDataset(desk, await makeDrawnSheet(app(), desk)));
    const address = `/api/v1/entries/${accession}/v/${version}/opinions`;
    expect((await request(app().app).get(address)).body).toMatchObject({ state: 'waiting' });
    await make(id);
    const answer = await request(app().app).get(address);
    expect(answer.status).toBe(200);
    expect(opinions.parse(answer.body).opinions.map((o) => o.reason === null)).toEqual([true, true, true, true, false]);
    // Which circuits were sealed is told by the seal alone.
    expect(JSON.stringify(answer.body)).not.toMatch(/c0\d\d\d/);
    expect((await request(app().app).get(`/api/v1/entries/${accession}/v/99/opinions`)).status).toBe(404);
  });

  it('a structured sheet is asked for, run, estimated and frozen; its entry is never ranked and says why, and its structure is analysed', async () => {
    const sheet = await makeDrawnSheet(app(), desk, { kind: 'structured', circuits: 240 });
    expect((await desk.client('get', `/api/v1/run-sheets/${sheet.id}`)).body).toMatchObject({ kind: 'structured' });
    const { id, accession, version } = await accepted(app(), desk, makeDataset(desk, sheet));
    const page = (await request(app().app).get(`/api/v1/entries/${accession}/v/${version}`)).body as { eligibility: { code: string; sentence: string }[] };
    expect(page.eligibility.find((r) => r.code === 'structured')?.sentence).toBe('The run sheet is structured: its circuits repeat blocks. Boards compare entries whose circuits were drawn gate by gate.');
    const board = (await request(app().app).get('/api/v1/boards/quarter-turn-1q/1')).body as { rows: { accession: string; eligible?: boolean }[] };
    expect(JSON.stringify(board.rows)).not.toContain(`"${accession}"`);
    await make(id);
    const { opinions: found } = opinions.parse((await request(app().app).get(`/api/v1/entries/${accession}/v/${version}/opinions`)).body);
    const structured = found.find((o) => o.method === 'structured')!;
    expect(structured.reason).toBeNull();
    expect(structured.figures.every((f) => f.value !== null && f.distance !== null)).toBe(true);
    expect(structured.prediction!.value).toBeLessThan(structured.prediction!.ideal);
  });

  it('a structured sheet of a pair is refused with its place', async () => {
    const answer = await desk.client('post', '/api/v1/run-sheets').send({ device: desk.device.id, gateClass: 'quarter-turn-cz-2q/1', register: ['q1', 'q2'], circuits: 1200, shots: 1000, kind: 'structured' });
    expect(answer.status).toBe(400);
    expect((answer.body as { errors: object[] }).errors).toEqual([{ pointer: '/kind', message: 'Structured sheets are drawn for gate classes of one qubit; quarter-turn-cz-2q/1 has more.' }]);
  });
});
