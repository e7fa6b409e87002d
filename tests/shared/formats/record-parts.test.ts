import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { instantOf } from '#shared/formats/instant.ts';
import { isOrcid, orcidCheckDigit } from '#shared/formats/orcid.ts';
import { pointerOf, shown, valueAt } from '#shared/formats/pointer.ts';

describe('ORCID check digit (ISO 7064 MOD 11-2)', () => {
  // Published sample iDs of the ORCID documentation; memory.
  test.each(['0000-0002-1825-0097', '0000-0001-5109-3700', '0000-0002-1694-233X'])('%s is valid', (orcid) => {
    expect(isOrcid(orcid)).toBe(true);
  });

  test('every single wrong digit and every swap of two neighbours is found', () => {
    fc.assert(fc.property(fc.stringMatching(/^[0-9]{15}$/), fc.nat(14), fc.integer({ min: 1, max: 9 }), (digits, at, shift) => {
      const check = orcidCheckDigit(digits);
      const wrong = digits.slice(0, at) + String((Number(digits[at]) + shift) % 10) + digits.slice(at + 1);
      expect(orcidCheckDigit(wrong)).not.toBe(check);
      const [a, b] = [digits[at] ?? '', digits[at + 1] ?? ''];
      if (b !== '' && a !== b) expect(orcidCheckDigit(digits.slice(0, at) + b + a + digits.slice(at + 2))).not.toBe(check);
    }), { seed: 1 });
  });
});

describe('instants (RFC 3339)', () => {
  test.each([
    ['2026-05-04T08:00:00Z', Date.UTC(2026, 4, 4, 8)], ['2026-05-04T10:00:00.250+02:00', Date.UTC(2026, 4, 4, 8, 0, 0, 250)],
    ['2024-02-29T23:59:59-00:30', Date.UTC(2024, 2, 1, 0, 29, 59)], ['0099-12-31T00:00:00Z', Date.parse('0099-12-31T00:00:00Z')],
  ])('%s', (text, time) => {
    expect(instantOf(text)).toBe(time);
  });

  test.each(['2026-02-29T00:00:00Z', '2026-13-01T00:00:00Z', '2026-00-10T00:00:00Z', '2026-04-31T00:00:00Z', '2026-05-04T24:00:00Z', '2026-05-04T08:60:00Z', '2026-05-04T08:00:60Z', '2026-05-04T08:00:00+24:00', '2026-05-04 08:00:00Z', '2026-05-04T08:00:00'])('%s is no instant', (text) => {
    expect(instantOf(text)).toBeNull();
  });

  test('agrees with the platform on every instant of the calendar', () => {
    fc.assert(fc.property(fc.date({ min: new Date('0001-01-01T00:00:00Z'), max: new Date('9999-12-31T23:59:59Z'), noInvalidDate: true }), (date) => {
      expect(instantOf(date.toISOString())).toBe(date.getTime());
    }), { seed: 1 });
  });
});

describe('pointers and values in sentences', () => {
  test('RFC 6901 escapes, and back', () => {
    expect(pointerOf('a/b', 'm~n', 0, '')).toBe('/a~1b/m~0n/0/');
    fc.assert(fc.property(fc.array(fc.string(), { maxLength: 4 }), fc.integer(), (path, value) => {
      const root = path.reduceRight<unknown>((inner, key) => Object.fromEntries([[key, inner]]), value);
      expect(valueAt(root, pointerOf(...path))).toBe(value);
    }), { seed: 1 });
    expect(valueAt({ a: 1 }, '/toString')).toBeUndefined();
  });

  test('shown values stay short, on one line, and turn no reading direction', () => {
    fc.assert(fc.property(fc.oneof(fc.string({ unit: 'binary', maxLength: 200 }), fc.jsonValue()), (value) => {
      const text = shown(value);
      expect([...text].length).toBeLessThanOrEqual(60);
      expect(text).not.toMatch(/[\u0000-\u001f\u007f-\u009f\u2028-\u202e\u2066-\u2069]/);
    }), { seed: 1 });
    expect(shown('left \u202e right')).toBe('"left \\u202e right"');
  });
});
