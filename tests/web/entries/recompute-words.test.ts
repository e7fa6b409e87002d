import { describe, expect, it } from 'vitest';
import type { ComparedFigure, Comparison } from '#shared/recompute/types.ts';
import { decimalsOf, differenceWords, gapWords, progressWords, valueWords, verdictOf } from '#web/features/entries/recompute/recompute-words.ts';
import { entryFixture } from '#tests/support/fixtures/entries.ts';

const headline = entryFixture.figures.find((f) => f.key === 'retained-signal' && f.depth === 16)!;
const figure = (differences: ComparedFigure['differences'], agreement: ComparedFigure['agreement']): ComparedFigure => ({ title: 'Retained signal, depth 16', frozen: headline, again: headline, differences, agreement });
const at = (pointer: string, gap: number | null) => ({ pointer: `/figures/4/${pointer}`, frozen: 0.9, again: 0.9, gap });
const digests = { frozenSha256: 'a', againSha256: 'a', largestGap: null };
const comparison = (figures: ComparedFigure[], agreement: Comparison['agreement']): Comparison => ({ agreement, figures, parts: [], result: { ...digests, agreement, largestGap: agreement === 'close' ? 2e-13 : null }, replicates: { ...digests, agreement: 'identical' } });

describe('words of a recomputation', () => {
  it('give a gap in powers of ten, or with its digits where it can be read', () => {
    expect([3.2e-12, 1e-9, 0.00078, 0.15].map(gapWords)).toEqual(['3 × 10⁻¹²', '1 × 10⁻⁹', '0.00078', '0.15']);
  });

  it('say where a figure differs: value, other numbers, or a changed answer', () => {
    expect(differenceWords(figure([], 'identical'))).toBe('none');
    expect(differenceWords(figure([at('value', 2e-3)], 'differs'))).toBe('0.002');
    expect(differenceWords(figure([at('value', 2e-3), at('standardError', 4e-3)], 'differs'))).toBe('0.002; 1 other number differs, by at most 0.004');
    expect(differenceWords(figure([at('intervals/0/low', 1e-12), at('intervals/0/high', 2e-12)], 'close'))).toBe('none in the value; 2 other numbers differ, by at most 2 × 10⁻¹²');
    expect(differenceWords(figure([at('value', null)], 'differs'))).toBe('another answer');
  });

  it('show as many digits as the difference needs, and never fewer than the figure has', () => {
    expect(decimalsOf(figure([], 'identical'))).toBe(4);
    expect(decimalsOf(figure([at('value', 3e-9)], 'close'))).toBe(10);
    expect(decimalsOf(figure([at('value', 0.5)], 'differs'))).toBe(4);
    expect([valueWords(0.9695, 4), valueWords(null, 4), valueWords(undefined, 4)]).toEqual(['0.9695', 'not determined', 'missing']);
  });

  it('name the stage, and count replicates while they are drawn', () => {
    expect(progressWords({ stage: 'files', fraction: 0, replicatesDone: null, replicates: null })).toBe('Fetching dataset, seal and result.');
    expect(progressWords({ stage: 'replicates', fraction: 0.5, replicatesDone: 1024, replicates: 2000 })).toBe('1\u202f024 of 2\u202f000 replicates.');
  });

  it('sum up: identical, close, different, not to be estimated', () => {
    const same = figure([], 'identical');
    const outcome = (c: Comparison | null, checks: { outcome: 'agrees' | 'differs' }[] = []) => verdictOf({ comparison: c, seconds: 0.62, checks: checks.map(({ outcome: o }) => ({ id: 'x', title: 'x', outcome: o, detail: '' })) });
    expect(outcome(comparison([same], 'identical'))).toMatchObject({ kind: 'done', label: 'Agrees', sentence: expect.stringMatching(/^Identical to the last digit.*in 0\.6 seconds\.$/) as unknown });
    expect(outcome(comparison([figure([at('value', 2e-13)], 'close'), same], 'close'))).toMatchObject({ kind: 'done', sentence: expect.stringMatching(/to nine digits, but not to the last: 1 of 2 parts differ, by at most 2 × 10⁻¹³/) as unknown });
    expect(outcome(comparison([figure([at('value', 2e-3)], 'differs'), same], 'differs'))).toMatchObject({ kind: 'fault', label: 'Differs', sentence: expect.stringContaining('1 of 2 figures differs from what was frozen.') as unknown });
    expect(outcome(comparison([same], 'identical'), [{ outcome: 'differs' }])).toMatchObject({ kind: 'fault', sentence: expect.stringContaining('A file does not fit the record.') as unknown });
    expect(outcome(null, [{ outcome: 'differs' }])).toMatchObject({ kind: 'fault', label: 'Not recomputed' });
  });
});
