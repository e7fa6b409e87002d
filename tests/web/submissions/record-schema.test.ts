import { describe, expect, it } from 'vitest';
import { embargoFault, lastEmbargoDay, recordFields, recordSchema } from '#web/features/submissions/record-schema.ts';
import { ready } from '#tests/support/fixtures/desk-submissions.ts';

const now = new Date('2026-05-04T22:30:00Z');

describe('the record’s form', () => {
  it('allows an embargo from tomorrow to 180 days ahead, in UTC days', () => {
    expect(lastEmbargoDay(now)).toBe('2026-10-31');
    expect(embargoFault('2026-05-05', now)).toBeNull();
    expect(embargoFault('2026-10-31', now)).toBeNull();
    expect(embargoFault('2026-11-01', now)).toBe('2026-11-01 is more than 180 days ahead; the last day allowed is 2026-10-31.');
    expect(embargoFault('2026-05-04', now)).toBe('2026-05-04 is not ahead; an embargo ends on a later day than today.');
    expect(embargoFault('2026-02-30', now)).toContain('2026-02-30 is not one');
  });

  it('takes an empty field as not filled, and trims the others', () => {
    expect(recordSchema(now).parse({ access: ' own device ', interests: '', notes: '  ', embargoUntil: '' })).toEqual({ access: 'own device', interests: null, notes: null, embargoUntil: null });
  });

  it('brings a record into its fields and back unchanged', () => {
    expect(recordSchema(now).parse(recordFields(ready.record))).toEqual(ready.record);
  });
});
