import { beforeAll, describe, expect, it, vi } from 'vitest';
import { board as boardContract, boardDifference, type Board } from '#shared/contracts/boards.ts';
import { device as deviceContract } from '#shared/contracts/devices.ts';
import { boardReadings } from '#shared/domain/board-figures.ts';
import { rankRanges } from '#shared/stats/rank-ranges.ts';
import { makeDataset, makeDesk, makeDrawnSheet, type Desk } from '#tests/support/record.ts';
import { accepted } from '#tests/support/life.ts';
import { asStranger } from '#tests/support/sign-in.ts';
import { useTestApp } from '#tests/support/test-app.ts';

// What was studied may change; these entries lie inside whatever it is. The rule itself is tested with the domain.
vi.mock('#shared/domain/figure-domains.ts', async () => {
  const { boardReadings: readings } = await import('#shared/domain/board-figures.ts');
  return { figureDomains: Object.values(readings).map(({ key, depth }) => ({ gateClass: 'quarter-turn-1q/1', key, depth, gateLoss: { from: 0, to: 1 }, shots: { from: 1, below: null } })) };
});

const app = useTestApp();
const desks: Desk[] = [];
const accession: Record<string, string> = {};
const ran = (endedAt: string) => ({ acquisition: { startedAt: endedAt, endedAt, software: 'in-house 1.4' } });

beforeAll(async () => {
  for (let i = 0; i < 3; i += 1) desks.push(await makeDesk(app()));
  const [a, b, c] = desks as [Desk, Desk, Desk];
  const freeze = async (name: string, desk: Desk, keep: number, more: object = {}, sheet: { circuits?: number } | null = {}): Promise<void> => {
    accession[name] = (await accepted(app(), desk, makeDataset(desk, sheet && (await makeDrawnSheet(app(), desk, sheet)), { keep, ...more }), { replicates: 200 })).accession;
  };
  await freeze('middle', a, 0.99);
  await freeze('best', b, 0.999);
  await freeze('worst', c, 0.98);
  await freeze('older', b, 0.9995, ran('2026-04-01T10:00:00Z'));
  await freeze('otherQubit', b, 0.97, { register: ['q8'] }, null);
  await freeze('small', c, 0.999, { register: ['q3'], ...ran('2026-03-01T10:00:00Z') }, { circuits: 150 });
});

const read = async (query = ''): Promise<Board> => boardContract.parse((await asStranger(app())('get', `/api/v1/boards/quarter-turn-1q/1${query}`)).body);
const names = (rows: { accession: string }[]): string[] => rows.map((r) => Object.entries(accession).find(([, a]) => a === r.accession)?.[0] ?? '');
const frozenReplicates = async (name: string, version: number, reading: { key: string; depth: number | null }): Promise<Float64Array> => {
  const reader = asStranger(app());
  const result = (await reader('get', `/api/v1/entries/${name}/v/${version}/result`)).body as { replicates: number; figures: { key: string; depth: number | null; gate: string | null }[] };
  const { body } = await reader('get', `/api/v1/entries/${name}/v/${version}/replicates`).buffer(true).parse((response, done) => {
    const parts: Buffer[] = [];
    response.on('data', (part: Buffer) => parts.push(part));
    response.on('end', () => done(null, Buffer.concat(parts)));
  });
  const row = result.figures.findIndex((f) => f.key === reading.key && f.depth === reading.depth && f.gate === null);
  return Float64Array.from({ length: result.replicates }, (_, b) => (body as Buffer).readDoubleLE(8 * (row * result.replicates + b)));
};
const reasonsOf = (board: Board, name: string): string[] => board.notListed.find((r) => r.row.accession === accession[name])?.reasons.map((r) => r.code) ?? [];

describe('a board', () => {
  it('lists the newest eligible entry of each device by estimate, best first', async () => {
    const board = await read();
    expect(names(board.rows)).toEqual(['best', 'middle', 'worst']);
    const values = board.rows.map((r) => r.figure.value ?? 0);
    expect(values).toEqual([...values].sort((x, y) => y - x));
  });

  it('gives each eligible entry the rank range that the frozen replicates of the figure give, and nobody else one', async () => {
    for (const figure of ['retained-signal-16', 'output-error-16', 'readout-loss'] as const) {
      const board = await read(`?figure=${figure}`);
      const reading = boardReadings[figure];
      const entries = await Promise.all(board.rows.map(async ({ accession: name, version, figure: { value } }) => ({ estimate: value ?? NaN, replicates: await frozenReplicates(name, version, reading) })));
      const expected = rankRanges(entries, reading.better).map(({ low, high, tiedWith }) => ({ low, high, tiedWith: tiedWith.map((i) => board.rows[i]?.accession ?? '').sort() }));
      expect(board.rows.map((r) => r.rank), figure).toEqual(expected);
      expect(board.ranking).toEqual({ level: 0.95, entries: 3, replicates: 200 });
      expect(board.notListed.every(({ row }) => row.rank === null)).toBe(true);
    }
    expect((await read()).rows.map((r) => [r.rank?.low, r.rank?.high])).toEqual([[1, 1], [2, 2], [3, 3]]);
  });

  it('a thread finds the same ranges as the process itself: dropped replicates cross over as they are', async () => {
    const entries = [0.97, 0.96, 0.9].map((estimate, i) => ({ estimate, replicates: Float64Array.from({ length: 300 }, (_, b) => (b === 7 * i ? NaN : estimate + 0.004 * (((b * (i + 3) * 37) % 300) / 150 - 1))) }));
    const expected = rankRanges(entries, 'higher', 0.95);
    expect(expected.map(({ low, high }) => [low, high])).not.toEqual([[1, 3], [1, 3], [1, 3]]);
    expect(await app().deps.threads.run('rank-ranges', { entries, better: 'higher', level: 0.95 })).toEqual(expected);
  });

  it('a filter hides rows but changes no rank; an older last circuit takes an entry out of the ranking', async () => {
    const whole = await read();
    const worst = await read(`?provider=${desks[2]?.organisation.slug}`);
    expect([worst.rows[0]?.rank, worst.ranking]).toEqual([whole.rows[2]?.rank, whole.ranking]);
    const now = app().clock.now();
    app().clock.set(new Date(now.getTime() + 40 * 86_400_000));
    expect((await read('?within=30')).ranking).toBeNull();
    app().clock.set(now);
  });

  it('compares two of its entries by their difference, one way as the other, and no entry that is not on it', async () => {
    const ask = async (a: string, b: string) => asStranger(app())('get', `/api/v1/boards/quarter-turn-1q/1/difference?a=${accession[a] ?? a}&b=${accession[b] ?? b}`);
    const forth = boardDifference.parse((await ask('middle', 'best')).body);
    const back = boardDifference.parse((await ask('best', 'middle')).body);
    const [best, middle] = (await read()).rows;
    expect(forth.value).toBeCloseTo((middle?.figure.value ?? NaN) - (best?.figure.value ?? NaN), 12);
    expect([forth.a.name, forth.b.name, forth.replicates]).toEqual([middle?.device.name, best?.device.name, 200]);
    expect(forth.shareBetter + back.shareBetter).toBeCloseTo(1, 12);
    expect(forth.intervals.map((i) => [i.level, -i.high, -i.low])).toEqual(back.intervals.map((i) => [i.level, expect.closeTo(i.low, 12), expect.closeTo(i.high, 12)]));
    expect((await ask('middle', 'otherQubit')).body).toMatchObject({ status: 404, code: 'not-found' });
    expect((await ask('middle', 'middle')).body).toMatchObject({ status: 400, code: 'invalid-request' });
  });

  it('names every other entry with all reasons and a remedy for each', async () => {
    const board = await read();
    expect(names(board.notListed.map((r) => r.row)).sort()).toEqual(['older', 'otherQubit', 'small']);
    expect(reasonsOf(board, 'older')).toEqual(['newer']);
    expect(reasonsOf(board, 'otherQubit')).toEqual(['own-design']);
    expect(reasonsOf(board, 'small')).toEqual(['floor', 'newer']);
    for (const { reasons } of board.notListed) for (const reason of reasons) expect([reason.sentence, reason.remedy].every((text) => /^[A-Z0-9].*\.$/.test(text)), JSON.stringify(reason)).toBe(true);
  });

  it('read by a figure where less is better turns round, and filters leave the order alone', async () => {
    expect(names((await read('?figure=output-error-16')).rows)).toEqual(['best', 'middle', 'worst']);
    const worst = await read(`?provider=${desks[2]?.organisation.slug}`);
    expect(names(worst.rows)).toEqual(['worst']);
    expect(worst.filters.providers).toHaveLength(3);
    expect((await read('?modality=photonic')).rows).toEqual([]);
    expect(reasonsOf(await read('?within=20'), 'older')).toEqual(['newer', 'old']);
  });

  it('is 404 for a class that does not exist and 400 for a figure that is none', async () => {
    const reader = asStranger(app());
    expect((await reader('get', '/api/v1/boards/quarter-turn-1q/9')).status).toBe(404);
    expect((await reader('get', '/api/v1/boards/quarter-turn-1q/1?figure=speed')).body).toMatchObject({ status: 400, code: 'invalid-request' });
  });
});

describe('lists of boards, classes and a device', () => {
  it('count entries and eligible ones, and name every class with its floor', async () => {
    const reader = asStranger(app());
    const boards = (await reader('get', '/api/v1/boards')).body as { items: { gateClass: { id: string }; entries: number; eligible: number }[] };
    expect(boards.items.find((b) => b.gateClass.id === 'quarter-turn-1q/1')).toMatchObject({ entries: 6, eligible: 3, first: { entries: 1, to: 1, of: 3 } });
    const classes = (await reader('get', '/api/v1/gate-classes')).body as { items: { id: string; href: string; gates: { words: string }[] }[] };
    expect(classes.items).toHaveLength(8);
    expect(classes.items[0]).toMatchObject({ id: 'quarter-turn-1q/1', href: '/schema/gate-class/quarter-turn-1q/1.json', floor: { circuits: 200, shots: 500 }, gates: [{ words: 'identity' }, { words: 'rx(π/2)' }, { words: 'ry(π/2)' }] });
  });

  it('a device tells its entries oldest first with the headline of each', async () => {
    const { body } = await asStranger(app())('get', `/api/v1/devices/${desks[1]?.device.id}`);
    const told = deviceContract.parse(body);
    expect(names(told.history)).toEqual(['older', 'best', 'otherQubit']);
    expect(told.entries).toBe(3);
    const list = async (query: string) => (await asStranger(app())('get', `/api/v1/devices${query}`)).body as { items: { id: string; entries: number }[]; nextCursor: string | null };
    const all = await list('');
    expect(all.items.find((d) => d.id === told.id)).toMatchObject({ entries: 3, demo: false });
    const first = await list('?limit=1');
    expect(first.items).toEqual(all.items.slice(0, 1));
    expect((await list(`?limit=200&cursor=${first.nextCursor}`)).items).toEqual(all.items.slice(1));
    expect(told.history.every((h) => h.headline?.depth === 16)).toBe(true);
  });
});
