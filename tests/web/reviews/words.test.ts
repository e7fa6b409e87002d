import { describe, expect, it } from 'vitest';
import { decisionSchema, decisionWords } from '#web/features/reviews/decision-schema.ts';
import { openingWords } from '#web/features/reviews/opening-words.ts';
import { nextInQueue, roundWords, waitingWords } from '#web/features/reviews/queue-words.ts';
import { claimed, queue } from '#tests/support/fixtures/desk-reviews.ts';

describe('the sentences over a case', () => {
  it('are made from the checks, the sealed check and the blocks', () => {
    expect(openingWords(claimed)).toBe('All nine checks passed, with two notes. The sealed circuits are predicted within chance. One block of eight lies outside the expected range.');
  });
  it('say so when a check failed, the sealed check failed and no block drifts', () => {
    const { submission } = claimed;
    const worse = { submission: { checks: submission.checks.map((c, i) => (i === 5 ? { ...c, status: 'failed' as const } : c)), result: submission.result && { ...submission.result, sealedCheck: submission.result.sealedCheck && { ...submission.result.sealedCheck, passed: false } } }, drift: claimed.drift.slice(0, 3) };
    expect(openingWords(worse)).toBe('One check of nine failed, with two notes. The sealed circuits are not predicted within chance. None of three blocks lies outside the expected range.');
  });
});

describe('the queue', () => {
  const now = new Date('2026-05-17T12:00:00Z');
  it('says how long a case has waited, in whole days', () => {
    expect(waitingWords('2026-05-15T10:00:00Z', now)).toBe('2 days');
    expect(waitingWords('2026-05-16T11:00:00Z', now)).toBe('1 day');
    expect(waitingWords('2026-05-17T11:00:00Z', now)).toBe('sent today');
  });
  it('says how often it came back', () => {
    expect([1, 2, 3].map(roundWords)).toEqual([null, 'returned once', 'returned 2 times']);
  });
  it('goes on with the next case that no one else reads, and round to the start', () => {
    expect(nextInQueue(queue.items, 'S-000209')?.id).toBe('S-000215');
    expect(nextInQueue(queue.items, 'S-000218')?.id).toBe('S-000209');
    expect(nextInQueue(queue.items.slice(0, 1), 'S-000209')).toBeNull();
  });
});

describe('the decision', () => {
  it('asks for an outcome, a reason and the word that there is no tie', () => {
    const parsed = decisionSchema.safeParse({ outcome: '', reason: '  ', noInterest: false });
    expect(parsed.error?.issues.map((i) => i.message)).toEqual(['Choose what you decide.', 'A decision needs its reason.', 'Declare that you have no tie to the organisation.']);
  });
  it('names its action after the choice', () => {
    expect(decisionWords('accept', null).action).toBe('Accept and freeze');
    expect(decisionWords('accept', '2026-09-01').action).toBe('Accept under embargo');
    expect(decisionWords('', null).action).toBe('Decide');
  });
});
