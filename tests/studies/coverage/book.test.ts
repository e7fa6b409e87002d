import { appendFileSync, mkdtempSync, readFileSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { quantileSorted } from '#shared/stats/quantile.ts';
import { coverageStudySchema } from '#shared/studies/coverage-study.ts';
import { cells, cellId, type Cell } from '#tests/studies/coverage/cells.ts';
import type { ChunkResult } from '#tests/studies/coverage/chunk.ts';
import { placeAmong, studyIntervals } from '#tests/studies/coverage/read-interval.ts';
import { nextOfSteps, nextTask } from '#tests/studies/coverage/schedule.ts';
import { summarise, writeStudy } from '#tests/studies/coverage/summarise.ts';
import { Tally } from '#tests/studies/coverage/tally.ts';
import { WorkFile } from '#tests/studies/coverage/work-file.ts';

const cell: Cell = { gateClass: 'quarter-turn-1q/1', noise: 0.001, coherent: 1, shots: 500, trials: 100, chunk: 50, replicates: 200 };
const result = (chunk: number, inside: number, loss = 0.001): ChunkResult => ({
  cell: cellId(cell), chunk, trials: 50, settled: 49, stopped: 0, passed: 48, loss, seconds: 1,
  figures: [{ key: 'retained-signal', depth: 16, gate: null, qubits: [0], trials: 50, inside: [25, 40, inside], below: 1, above: 49 - inside, z: 5, zz: 60, settled: [49, inside - 1] }],
});

describe('the work file', () => {
  let folder = '';
  beforeEach(() => {
    folder = mkdtempSync(join(tmpdir(), 'study-'));
  });
  afterEach(() => rmSync(folder, { recursive: true }));

  it('keeps finished chunks over a stop, counts none twice, and loses nothing but a line that was cut off', () => {
    const path = join(folder, 'deep', 'work.ndjson');
    const first = new WorkFile(path);
    first.add(result(0, 47));
    first.add(result(0, 40));
    appendFileSync(path, '{"cell":"quarter-tur');
    const second = new WorkFile(path);
    expect(second.results).toEqual([result(0, 47)]);
    expect([second.has(cellId(cell), 0), second.has(cellId(cell), 1)]).toEqual([true, false]);
    second.add(result(1, 48));
    expect(new WorkFile(path).results).toEqual([result(0, 47), result(1, 48)]);
    expect(readFileSync(path, 'utf8').endsWith('\n')).toBe(true);
  });
});

describe('the schedule', () => {
  it('goes on with the cell that is furthest behind, fills gaps first, and ends', () => {
    const two = [cell, { ...cell, noise: 0.01 }];
    const done = new Set<string>();
    const order: string[] = [];
    for (let task = nextTask(two, (c, k) => done.has(`${c} ${k}`)); task; task = nextTask(two, (c, k) => done.has(`${c} ${k}`))) {
      done.add(`${cellId(task.cell)} ${task.chunk}`);
      order.push(`${task.cell.noise} ${task.chunk}`);
    }
    expect(order).toEqual(['0.001 0', '0.01 0', '0.001 1', '0.01 1']);
    expect(nextTask([cell], (_, k) => k === 1)).toEqual({ cell, chunk: 0 });
  });

  it('finishes a step before it goes on with the next', () => {
    const late = { ...cell, noise: 0.01 };
    expect(nextOfSteps([[cell], [late]], (c, k) => c === cellId(late) || k === 0)).toEqual({ cell, chunk: 1 });
    expect(nextOfSteps([[cell], [late]], (c) => c === cellId(cell))).toEqual({ cell: late, chunk: 0 });
    expect(nextOfSteps([[cell], [late]], () => true)).toBeNull();
  });

  it('names every cell once, so that no seed is used twice', () => {
    expect(new Set(cells.map(cellId)).size).toBe(cells.length);
    expect(cells.every((c) => c.trials >= 100)).toBe(true);
  });
});

describe('the summary', () => {
  it('adds the counts of a cell’s chunks and leaves out cells without trials', () => {
    const study = summarise([result(1, 48, 0.003), result(0, 46)], [cell, { ...cell, noise: 0.01 }], '2026-12-01');
    expect(study.cells).toHaveLength(1);
    expect(study.cells[0]).toMatchObject({ trials: 100, devices: 2, settled: 98, sealedPassed: 96, greatestLoss: 0.002, noise: 0.001, replicates: 200 });
    expect(study.cells[0]!.figures).toEqual([{ key: 'retained-signal', depth: 16, gate: null, qubits: [0], trials: 100, inside: [50, 80, 94], below: 2, above: 4, z: [0.1, 1.096], settled: [98, 92] }]);
  });

  it('is written so that it reads back, and keeps its schema', () => {
    const study = summarise([result(0, 47)], [cell], '2026-12-01');
    expect(JSON.parse(writeStudy(study))).toEqual(study);
    expect(coverageStudySchema.parse(study)).toEqual(study);
  });
});

describe('intervals from fewer replicates', () => {
  const normal = Float64Array.from({ length: 200 }, (_, i) => i);

  it('with the published number the places are those of type 7', () => {
    for (const q of [0.025, 0.1, 0.25, 0.75, 0.9, 0.975]) expect(placeAmong(2000, q)).toBeCloseTo(1999 * q, 9);
  });

  it('a further replicate falls outside as often: (place + 1)/(B + 1) is the same', () => {
    for (const B of [100, 200, 1000]) expect((placeAmong(B, 0.025) + 1) / (B + 1)).toBeCloseTo((1999 * 0.025 + 1) / 2001, 12);
    expect(placeAmong(200, 0.025)).toBeLessThan(199 * 0.025);
  });

  it('distances are reflected about the estimate and cut at 0; others are percentiles', () => {
    const [half, , wide] = studyIntervals(normal, 100, false);
    expect(half!.low).toBeCloseTo(quantileSorted(normal, 0.25), 0);
    expect(wide!.high).toBeCloseTo(199 - wide!.low, 9);
    const reflected = studyIntervals(normal, 90, true)[2]!;
    expect([reflected.low, reflected.high]).toEqual([0, expect.closeTo(180 - wide!.low, 9)]);
  });
});

it('a tally knows on which side the truth lay, and leaves out what has no interval', () => {
  const tally = new Tally();
  const name = { key: 'gate-loss', depth: null, gate: 'rx', qubits: [0] } as const;
  const replicates = Float64Array.from({ length: 201 }, (_, i) => i - 100);
  tally.add(name, 0, 0, replicates, false, true);
  tally.add(name, 99, 0, replicates, false, true);
  tally.add(name, -99, 0, replicates, false, false);
  tally.add(name, 0, NaN, replicates, false, true);
  tally.add(name, 0, 0, new Float64Array(5).fill(NaN), false, true);
  expect(tally.figures).toHaveLength(1);
  expect(tally.figures[0]).toMatchObject({ trials: 3, inside: [1, 1, 1], below: 1, above: 1, settled: [2, 1] });
});
