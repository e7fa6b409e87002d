import { createHash } from 'node:crypto';
import { readdirSync, readFileSync } from 'node:fs';
import { beforeAll, describe, expect, it } from 'vitest';
import { runSheetView } from '#shared/contracts/run-sheets.ts';
import { gateClassById } from '#shared/domain/gate-classes.ts';
import { readRunSheet } from '#shared/formats/read-run-sheet.ts';
import { checkSeal } from '#shared/runsheet/seal.ts';
import { drawRunSheet } from '#api/modules/run-sheets/draw.ts';
import { readSheetSeal } from '#api/modules/run-sheets/sheet-store.ts';
import { bytesOf, makeDesk, takeCounts, workFor, type Desk } from '#tests/support/record.ts';
import { estimated } from '#tests/support/life.ts';
import { asStranger } from '#tests/support/sign-in.ts';
import { useTestApp } from '#tests/support/test-app.ts';
import type { Dataset, RunSheet } from '#shared/formats/types.ts';

const app = useTestApp();
let desk: Desk;
let other: Desk;
beforeAll(async () => {
  desk = await makeDesk(app());
  other = await makeDesk(app());
});
const address = '/api/v1/run-sheets';
const plan = (more: object = {}) => ({ device: desk.device.id, gateClass: 'quarter-turn-1q/1', register: ['q3'], circuits: 200, shots: 500, ...more });

describe('a run sheet', () => {
  it('is asked for, drawn by a job with its seal kept apart, downloaded, and matched by a dataset that ran it', async () => {
    const asked = await desk.client('post', address).send(plan());
    expect(asked.status).toBe(202);
    const waiting = runSheetView.parse(asked.body);
    expect(waiting).toMatchObject({ state: 'waiting', progress: 0, file: null, circuitsAsked: 200, sealSha256: null });
    expect(asked.headers.location).toBe(`${address}/${waiting.id}`);
    const jobs = await app().deps.pool.query("select data from pgboss.job where name = 'draw-sheet' and data ->> 'runSheet' = $1", [waiting.id]);
    expect(jobs.rows).toEqual([{ data: { runSheet: waiting.id } }]);
    expect((await desk.client('get', `${address}/${waiting.id}/file`)).body).toMatchObject({ status: 409, code: 'wrong-state' });

    expect(await drawRunSheet(await workFor(app(), null), waiting.id)).toBe(true);
    const drawn = runSheetView.parse((await desk.client('get', `${address}/${waiting.id}`)).body);
    expect(drawn).toMatchObject({ state: 'drawn', circuits: 200, sealed: 50, totalShots: 125_000, rank: 31, progress: 1, submission: null });
    expect(drawn.conditionRatio).toBeGreaterThanOrEqual(0.01);

    const file = await desk.client('get', drawn.file ?? '').buffer(true);
    expect(file.headers['content-disposition']).toBe(`attachment; filename="${drawn.id}.json"`);
    expect(createHash('sha256').update(file.text).digest('hex')).toBe(drawn.sheetSha256);
    const reading = readRunSheet(new TextEncoder().encode(file.text));
    expect(reading.ok && reading.contentId).toBe(drawn.sheetSha256);
    const sheet = JSON.parse(file.text) as RunSheet;
    const seal = await readSheetSeal(app().deps.orm.em.fork(), drawn.id);
    expect(checkSeal(seal!, sheet)).toEqual([]);
    for (const text of [file.text, JSON.stringify(drawn)]) expect(text).not.toContain(seal?.secret);

    const dataset: Dataset = {
      format: 'evenbeam.dataset', formatVersion: '1.0.0', title: 'As drawn', gateClass: sheet.gateClass, runSheet: { id: drawn.id, sha256: drawn.sheetSha256! }, device: { ...sheet.device!, modality: 'superconducting' }, register: sheet.register, gates: sheet.gates,
      patches: [{ qubits: [0], circuits: takeCounts(sheet.patches[0]!.circuits, sheet.shots, 3) }], acquisition: { startedAt: '2026-05-03T08:00:00Z', endedAt: '2026-05-03T09:00:00Z', software: 'x' }, contributors: [{ name: 'A. Example' }], licence: 'CC-BY-4.0',
    };
    const id = await estimated(app(), desk, dataset);
    const { body } = await desk.client('get', `/api/v1/submissions/${id}`);
    expect(body).toMatchObject({ state: 'ready', runSheet: drawn.id });
    for (const secret of seal!.sealed.slice(0, 50)) expect(JSON.stringify((body as { result: unknown }).result)).not.toContain(`"${secret}"`);
    expect(JSON.stringify(body)).not.toContain(seal?.secret);
    expect(bytesOf(dataset).length).toBeGreaterThan(0);
  });

  it('drawn once stays as it is: a second attempt at the job does nothing', async () => {
    const { id } = (await desk.client('post', address).send(plan())).body as { id: string };
    const work = await workFor(app(), null);
    expect(await Promise.all([drawRunSheet(work, id), drawRunSheet(await workFor(app(), null), id)]).then((done) => done.filter(Boolean).length)).toBe(1);
    const first = (await desk.client('get', `${address}/${id}`)).body;
    expect(await drawRunSheet(work, id)).toBe(false);
    expect((await desk.client('get', `${address}/${id}`)).body).toEqual(first);
  });

  it('repeats the answer for the same Idempotency-Key', async () => {
    const [a, b] = [await desk.client('post', address).set('idempotency-key', 'rs').send(plan()), await desk.client('post', address).set('idempotency-key', 'rs').send(plan())];
    expect(b.body).toEqual(a.body);
    expect((await desk.client('post', address).set('idempotency-key', 'rs').send(plan({ shots: 600 }))).status).toBe(422);
  });

  it.each([
    ['/circuits', { circuits: 120 }, '120 is below the floor of 200 for this gate class.'],
    ['/shots', { shots: 100 }, '100 is below the floor of 500 for this gate class.'],
    ['/register', { register: ['q1', 'q2'] }, 'This gate class has 1 qubit; 2 are named.'],
    ['/gateClass', { gateClass: 'nothing/1' }, 'There is no gate class "nothing/1".'],
  ])('with a fault at %s is refused with the sentence for it', async (pointer, more, message) => {
    expect((await desk.client('post', address).send(plan(more))).body).toMatchObject({ status: 400, errors: [{ pointer, message }] });
  });

  it('names each qubit once', async () => {
    expect((await desk.client('post', address).send(plan({ gateClass: 'quarter-turn-cz-2q/1', circuits: 1200, shots: 1000, register: ['q1', 'q1'] }))).body).toMatchObject({ status: 400, errors: [{ pointer: '/register' }] });
  });

  it('belongs to its organisation', async () => {
    const { id } = (await desk.client('post', address).send(plan())).body as { id: string };
    for (const path of ['', '/file']) expect((await other.client('get', `${address}/${id}${path}`)).status, path).toBe(403);
    expect((await other.client('post', address).send(plan())).status).toBe(403);
    expect((await other.client('get', `${address}?organisation=${desk.organisation.id}`)).status).toBe(403);
    expect((await asStranger(app())('get', address)).status).toBe(401);
    const list = (await desk.client('get', `${address}?limit=2`)).body as { items: { id: string }[]; nextCursor: string | null };
    expect(list.items[0]?.id).toBe(id);
    expect(((await desk.client('get', `${address}?limit=2&cursor=${list.nextCursor}`)).body as { items: { id: string }[] }).items.map((i) => i.id)).not.toContain(id);
    expect(((await other.client('get', address)).body as { items: unknown[] }).items).toEqual([]);
  });
});

describe('the secret of a seal', () => {
  it('is read by the estimate, by second opinions, by freezing and by the scrub only, and its table is named in one module', () => {
    const files = (readdirSync('api', { recursive: true, encoding: 'utf8' })).filter((f) => f.endsWith('.ts')).map((f) => ({ f, text: readFileSync(`api/${f}`, 'utf8') }));
    const naming = (word: string, but: RegExp): string[] => files.filter(({ f, text }) => text.includes(word) && !but.test(f)).map(({ f }) => f).sort();
    expect(naming('readSheetSeal', /sheet-store\.ts$/)).toEqual(['modules/entries/freeze.ts', 'modules/opinions/make-opinions.ts', 'modules/scrub/check-files.ts', 'modules/submissions/run-estimate.ts']);
    expect(naming('run_sheet_secret', /migrations\//)).toEqual(['modules/run-sheets/draw.ts', 'modules/run-sheets/sheet-store.ts']);
    expect(gateClassById('quarter-turn-1q/1')?.ranked).toBe(true);
  });
});
