import { describe, expect, it } from 'vitest';
import { certainWords, firstWords, leadOf, ordinal, rangeWords } from '#web/features/boards/rank-words.ts';
import { differenceWords, shareWords } from '#web/features/boards/difference-words.ts';
import { differenceFixture } from '#tests/support/fixtures/boards.ts';

describe('words for ranks', () => {
  it('“1st” is printed only where the range is one place', () => {
    expect([rangeWords({ low: 1, high: 1 }), rangeWords({ low: 1, high: 2 }), rangeWords({ low: 12, high: 12 })]).toEqual(['1st', '1 to 2', '12th']);
    expect([2, 3, 4, 11, 12, 13, 21, 22, 101, 111].map(ordinal)).toEqual(['2nd', '3rd', '4th', '11th', '12th', '13th', '21st', '22nd', '101st', '111th']);
  });

  it('tell of the first place no more than the ranges do', () => {
    expect(firstWords({ entries: 1, to: 1, of: 5 })).toBe('One entry holds rank 1');
    expect(firstWords({ entries: 3, to: 3, of: 12 })).toBe('Three entries share ranks 1 to 3');
    expect(firstWords({ entries: 2, to: 3, of: 12 })).toBe('Two entries may hold rank 1');
    expect(firstWords({ entries: 5, to: 5, of: 5 })).toBe('No two entries can be told apart');
    expect(firstWords({ entries: 2, to: 2, of: 2 })).toBe('The two cannot be told apart');
    expect(leadOf([{ low: 1, high: 2 }, { low: 1, high: 3 }, { low: 2, high: 3 }])).toEqual({ entries: 2, to: 3, of: 3 });
  });

  it('name the certain places while they are few', () => {
    const at = (...places: number[]) => places.map((place) => ({ low: place, high: place }));
    const open = { low: 1, high: 9 };
    expect(certainWords([open])).toBe('No place is certain.');
    expect(certainWords([...at(12, 4), open])).toBe('Two places are certain: the 4th and the 12th.');
    expect(certainWords([...at(1, 2, 3, 4, 5), open])).toBe('Five places are certain.');
    expect(certainWords(at(1, 2))).toBe('Every place is certain.');
  });
});

describe('words for a difference', () => {
  it('name the better one, by how much, with the interval of the difference', () => {
    expect(differenceWords(differenceFixture)).toBe('Meadow-5 is better than Quill-7 by 0.0175 (95\u202f% interval 0.0120 to 0.0230); better in above 99.9\u202f% of replicates.');
  });

  it('turn round where lower is better', () => {
    expect(differenceWords({ ...differenceFixture, figure: 'error-per-gate', shareBetter: 0.002 })).toBe('Quill-7 is better than Meadow-5 by 0.0175 (95\u202f% interval 0.0120 to 0.0230); better in 99.8\u202f% of replicates.');
  });

  it('call nobody better while the interval holds zero', () => {
    const open = { ...differenceFixture, value: 0.0012, intervals: [{ level: 0.95, low: -0.004, high: 0.0064 }], shareBetter: 0.674 };
    expect(differenceWords(open)).toBe('Meadow-5 less Quill-7 is +0.0012 (95\u202f% interval −0.0040 to 0.0064), which holds zero; Meadow-5 is the better one in 67\u202f% of replicates.');
  });

  it('give a share no false certainty', () => {
    expect([1, 0.9995, 0.995, 0.5, 0.004, 0].map(shareWords)).toEqual(['above 99.9\u202f%', 'above 99.9\u202f%', '99.5\u202f%', '50\u202f%', '0.4\u202f%', 'below 0.1\u202f%']);
  });
});
