import { describe, expect, it } from 'vitest';
import { boardJsonAddress } from '#web/features/boards/api/boards.ts';
import { boardData } from '#web/features/boards/board-data.ts';
import { isFiltered, viewOf, withField } from '#web/features/boards/board-view.ts';
import { boardFixture } from '#tests/support/fixtures/boards.ts';

describe('board data', () => {
  const data = boardData(boardFixture, 'Board');

  it('numbers drawn are the numbers of its table, in the order of the answer', () => {
    const column = data.table.columns.findIndex((c) => c.csv === 'estimate');
    expect(data.table.rows.map((row) => row[column]?.raw)).toEqual(boardFixture.rows.map((row) => row.figure.value));
    const low = data.table.columns.findIndex((c) => c.csv === 'low_95');
    expect(data.table.rows.map((row) => row[low]?.raw)).toEqual(boardFixture.rows.map((row) => row.figure.intervals?.[2]?.low));
  });

  it('rank ranges and their level stand beside the estimates, and are missing where nothing is ranked', () => {
    const ranks = (table: typeof data.table) => table.rows.map((row) => ['rank_low', 'rank_high', 'rank_level'].map((csv) => row[table.columns.findIndex((c) => c.csv === csv)]?.raw));
    expect(ranks(data.table)).toEqual(boardFixture.rows.map(({ rank }) => [rank?.low, rank?.high, 0.95]));
    expect(ranks(boardData({ rows: boardFixture.rows.map((row) => ({ ...row, rank: null })), ranking: null }, 'Board').table)[0]).toEqual([null, null, null]);
  });

  it('one axis holds every interval of every row, and one number of digits is kept', () => {
    for (const { figure } of boardFixture.rows) for (const i of figure.intervals ?? []) {
      expect(data.axis.at(i.low)).toBeGreaterThanOrEqual(0);
      expect(data.axis.at(i.high)).toBeLessThanOrEqual(100);
    }
    expect(data.decimals).toBe(4);
  });

  it('every row has as many cells as there are columns, and demonstration rows say so', () => {
    for (const row of data.table.rows) expect(row).toHaveLength(data.table.columns.length);
    expect(data.table.rows[0]?.at(-1)?.raw).toBe('yes');
  });
});

describe('how a board is read', () => {
  it('comes from the address; what is unknown falls back', () => {
    expect(viewOf(new URLSearchParams('figure=error-per-gate&modality=spin&within=90'))).toEqual({ figure: 'error-per-gate', modality: 'spin', provider: undefined, within: 90 });
    for (const bad of ['figure=speed', 'within=-1', 'within=abc', 'within=1e9']) expect(viewOf(new URLSearchParams(bad))).toEqual({ figure: 'retained-signal-16', modality: undefined, provider: undefined, within: undefined });
  });

  it('names a method version only where it could be one', () => {
    expect(viewOf(new URLSearchParams('method=M2')).method).toBe('M2');
    for (const bad of ['method=', 'method=M0', 'method=m2', 'method=M2-x']) expect(viewOf(new URLSearchParams(bad)).method).toBeUndefined();
    expect(boardJsonAddress('a/1', viewOf(new URLSearchParams('method=M2')))).toBe('/api/v1/boards/a/1?figure=retained-signal-16&method=M2');
  });

  it('a view is a filter only where it leaves entries out', () => {
    expect([isFiltered(viewOf(new URLSearchParams('figure=readout-loss'))), isFiltered(viewOf(new URLSearchParams('provider=x')))]).toEqual([false, true]);
  });

  it('changing one field keeps the others; an empty field goes', () => {
    expect(withField(new URLSearchParams('a=1&b=2'), 'b', '').toString()).toBe('a=1');
    expect(withField(new URLSearchParams('a=1'), 'b', 'x y').toString()).toBe('a=1&b=x+y');
  });

  it('names the same board as JSON', () => {
    expect(boardJsonAddress('quarter-turn-1q/1', { figure: 'readout-loss', modality: 'spin', provider: undefined, within: 30 })).toBe('/api/v1/boards/quarter-turn-1q/1?figure=readout-loss&modality=spin&within=30');
  });
});
