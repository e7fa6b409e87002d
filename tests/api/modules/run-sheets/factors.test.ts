/** Factors of designs are kept beside the run sheet, taken by its estimates, and thrown away when others are wanted more. */
import { describe, expect, it } from 'vitest';
import { simulateDataset } from '#api/demo/simulator/simulate-dataset.ts';
import { estimateDataset } from '#api/jobs/tasks/estimate-dataset.ts';
import { drawRunSheet } from '#api/modules/run-sheets/draw.ts';
import { forgetFactors, keepFactors, readFactors } from '#api/modules/run-sheets/factor-store.ts';
import { createRunSheet } from '#api/modules/run-sheets/service.ts';
import { readSheet, readSheetSeal } from '#api/modules/run-sheets/sheet-store.ts';
import { runEstimate } from '#api/modules/submissions/run-estimate.ts';
import { Submission } from '#api/entities/submission.ts';
import { canonicalJson, sha256Hex } from '#shared/formats/canonical-json.ts';
import { lineModel } from '#tests/shared/method/chain/made-register.ts';
import { receive } from '#tests/support/life.ts';
import { makeDesk, makeDrawnSheet, workFor } from '#tests/support/record.ts';
import { useTestApp } from '#tests/support/test-app.ts';

const app = useTestApp();
const em = () => app().deps.orm.em.fork();
const rows = async (): Promise<{ key: string; run_sheet_id: string; bytes: Buffer; used_at: Date }[]> =>
  (await app().deps.pool.query<{ key: string; run_sheet_id: string; bytes: Buffer; used_at: Date }>('select * from design_factor order by used_at, key')).rows;
const keyOf = (n: number): string => n.toString(16).padStart(64, '0');

describe('a drawn sheet of a chained pair', () => {
  it('keeps the judgement of its pair; the estimate takes it, and gives the bytes that it gives without', async () => {
    const desk = await makeDesk(app());
    const work = await workFor(app(), desk.contributor);
    const { id } = await createRunSheet(work, { device: desk.device.id, gateClass: 'chained-cz-2q/1', register: ['q0', 'q1'], circuits: 600, shots: 1000 });
    expect(await drawRunSheet(await workFor(app(), null), id)).toBe(true);
    const [kept, ...others] = await rows();
    expect(others).toEqual([]);
    expect(kept).toMatchObject({ run_sheet_id: id });
    expect(kept!.bytes).toHaveLength(64);

    const sheet = (await readSheet(em(), id))!;
    const dataset = simulateDataset({
      sheet, sheetSha256: sha256Hex(new TextEncoder().encode(canonicalJson(sheet))), model: lineModel(2), seed: 'factors', title: 'Spring run', device: { provider: desk.organisation.name, name: desk.device.name, modality: 'superconducting' },
      startedAt: new Date('2026-05-04T08:00:00Z'), endedAt: new Date('2026-05-04T10:00:00Z'), software: 'test', contributors: [{ name: 'A. Example' }],
    });
    app().clock.advance(60_000);
    const submission = await receive(app(), desk, dataset, { replicates: 40 });
    expect(await runEstimate(await workFor(app(), null), submission, 1)).toBe(true);
    const { estimateId } = await em().findOneOrFail(Submission, { id: submission });
    const [stored] = (await app().deps.pool.query<{ result: Buffer }>('select result from submission_estimate where id = $1', [estimateId])).rows;
    const plain = estimateDataset({ bytes: new TextEncoder().encode(JSON.stringify(dataset)), seal: await readSheetSeal(em(), id), replicates: 40 }, () => undefined);
    expect(stored!.result.equals(Buffer.from(plain.result))).toBe(true);
    // Without a store the same factor is made again: the very one that was drawn, under the same key.
    expect(plain.factors.map(([key, bytes]) => [key, Buffer.from(bytes)])).toEqual([[kept!.key, kept!.bytes]]);
    const [after] = await rows();
    expect(after!.used_at.getTime()).toBe(app().clock.now().getTime());
    const held = estimateDataset({ bytes: new TextEncoder().encode(JSON.stringify(dataset)), seal: await readSheetSeal(em(), id), replicates: 40, factors: [[kept!.key, kept!.bytes]] }, () => undefined);
    expect(held.factors).toEqual([]);
    expect(held.resultSha256).toBe(plain.resultSha256);
  }, 120_000);
});

describe('the store of factors', () => {
  it('gives a sheet its own only, replaces a spoilt one, and forgets those unused for the longest', async () => {
    await app().deps.pool.query('delete from design_factor');
    const desk = await makeDesk(app());
    const [first, second] = [await makeDrawnSheet(app(), desk), await makeDrawnSheet(app(), desk)];
    const at = (minutes: number): Date => new Date(Date.parse('2026-06-01T00:00:00Z') + 60_000 * minutes);
    for (let n = 0; n < 5; n++) await keepFactors(em(), first.id, [[keyOf(n), Uint8Array.of(n)]], at(n));
    await keepFactors(em(), second.id, [[keyOf(9), Uint8Array.of(9)]], at(2));
    await keepFactors(em(), first.id, [[keyOf(4), Uint8Array.of(44)]], at(6));
    expect((await rows()).map((r) => [r.key, r.bytes[0]])).toEqual([[keyOf(0), 0], [keyOf(1), 1], [keyOf(2), 2], [keyOf(9), 9], [keyOf(3), 3], [keyOf(4), 44]]);
    expect((await readFactors(em(), second.id, at(10))).map(([key, bytes]) => [key, [...bytes]])).toEqual([[keyOf(9), [9]]]);
    expect(await forgetFactors(em(), 3)).toBe(3);
    expect((await rows()).map((r) => r.key)).toEqual([keyOf(3), keyOf(4), keyOf(9)]);
    expect(await forgetFactors(em())).toBe(0);
  });
});
