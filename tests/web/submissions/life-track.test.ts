import { describe, expect, it } from 'vitest';
import { lifeTrack } from '#web/features/submissions/life-track.ts';
import { blocked, checking, frozen, inReview, ready, returned } from '#tests/support/fixtures/desk-submissions.ts';

const line = (life: Parameters<typeof lifeTrack>[0]): string => lifeTrack(life).map((s) => `${s.place === 'past' ? '=' : s.place === 'now' ? '>' : '-'}${s.state}`).join(' ');

describe('the line of a submission’s life', () => {
  it('shows what is behind, where it stands and what may follow', () => {
    expect(line(checking)).toBe('=draft >checking -ready -in-review -accepted -frozen');
    expect(line(inReview)).toBe('=draft =checking =ready >in-review -accepted -frozen');
    expect(line(frozen)).toBe('=draft =checking =ready =in-review =accepted >frozen');
  });

  it('puts a state off the road in place of the step it missed, and promises nothing after it', () => {
    expect(line(blocked)).toBe('=draft =checking >blocked');
    expect(line(returned)).toBe('=draft =checking =ready =in-review >returned');
  });

  it('announces an embargo only where a date is named', () => {
    expect(line({ ...ready, record: { ...ready.record, embargoUntil: '2026-09-01' } })).toBe('=draft =checking >ready -in-review -accepted -embargoed -frozen');
  });

  it('tells the present round only, after a file was replaced', () => {
    const again = { ...checking, history: [...returned.history, { state: 'draft' as const, at: '2026-05-18T08:00:00Z', by: 'A. Example', reason: null }, { state: 'checking' as const, at: '2026-05-18T08:00:01Z', by: null, reason: null }] };
    expect(line(again)).toBe('=draft >checking -ready -in-review -accepted -frozen');
    expect(lifeTrack(again)[0]?.at).toBe('2026-05-18T08:00:00Z');
  });

  it('ends at a cancellation', () => {
    const cancelled = { ...ready, state: 'cancelled' as const, history: [...ready.history, { state: 'cancelled' as const, at: '2026-05-05T08:00:00Z', by: 'A. Example', reason: null }] };
    expect(line(cancelled)).toBe('=draft =checking =ready >cancelled');
  });
});
