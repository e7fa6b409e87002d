import { describe, expect, it } from 'vitest';
import { Xoshiro256 } from '#shared/random/xoshiro256.ts';
import { naiveIntervals, runBoard, standardError, trueValue } from '#tests/studies/ranks/board.ts';
import { BASE, scenarios } from '#tests/studies/ranks/scenarios.ts';

const stream = (n: number) => new Xoshiro256(new Uint8Array(32).fill(n));

describe('a simulated board', () => {
  it('is the same from the same seed, and every scenario has ten devices', () => {
    for (const scenario of scenarios) {
      expect([scenario.offsets.length, scenario.shots.length]).toEqual([10, 10]);
      expect(runBoard(scenario, 100, 0.95, stream(5))).toEqual(runBoard(scenario, 100, 0.95, stream(5)));
    }
  });

  it('counts a board as covered only if no range leaves out a rank that its device may claim', () => {
    const far = { id: 'far', title: '', offsets: [0, -60], shots: [1000, 1000] };
    expect(runBoard(far, 200, 0.95, stream(1))).toEqual({ covered: true, naive: true, width: 1 });
    // Said to be equal, measured as far apart as they are: both ranges are single ranks, and each leaves out the other.
    const equal = { id: 'equal', title: '', offsets: [0, 0], shots: [1000, 1000] };
    const found = Array.from({ length: 60 }, (_, n) => runBoard(equal, 200, 0.95, stream(n + 10)));
    for (const { covered, width } of found) expect(width).toBe(covered ? 2 : 1);
  });

  it('offsets are in standard errors of the figure, which halve with four times the shots', () => {
    expect(trueValue(0)).toBe(BASE);
    expect(trueValue(1) - BASE).toBeCloseTo(standardError(BASE, 1000), 12);
    expect(standardError(BASE, 4000)).toBeCloseTo(standardError(BASE, 1000) / 2, 12);
  });

  it('percentile intervals of the bootstrap rank by hand: always first, always second', () => {
    const entries = [{ estimate: 1, replicates: [1, 1.1, 0.9] }, { estimate: 0, replicates: [0, 0.1, -0.1] }];
    expect(naiveIntervals(entries, 3, 0.95)).toEqual([{ low: 1, high: 1 }, { low: 2, high: 2 }]);
  });
});
