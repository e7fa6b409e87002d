import { describe, expect, it } from 'vitest';
import { closedReason } from '#web/features/submissions/send-gate.ts';
import { blocked, checking, inReview, ready, returned } from '#tests/support/fixtures/desk-submissions.ts';

describe('why “Send to review” is closed', () => {
  it('is open when the checks have passed and the record is complete', () => expect(closedReason(ready)).toBeNull());
  it('counts the checks still to come', () => expect(closedReason(checking)).toBe('Three checks are still to come.'));
  it('names the checks that failed', () => expect(closedReason(blocked)).toBe('One check failed: Circuits match run sheet RS-000123. Send a new file.'));
  it('names what the record lacks', () => {
    const bare = { ...ready, recordComplete: false, record: { ...ready.record, access: null, interests: null } };
    expect(closedReason(bare)).toBe('Fill in how the device was reached and the interests first.');
    expect(closedReason({ ...bare, record: { ...bare.record, access: 'own device' } })).toBe('Fill in the interests first.');
  });
  it('says where it lies otherwise', () => {
    expect(closedReason(inReview)).toBe('It lies with a curator.');
    expect(closedReason(returned)).toContain('The curator returned it');
    expect(closedReason({ ...ready, may: { ...ready.may, send: false } })).toBe('Only a contributor of the organisation may send it.');
  });
});
