import { createHash } from 'node:crypto';
import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { canonicalJson, canonicalJsonByLibrary, contentIdOf, sha256Hex } from '#shared/formats/canonical-json.ts';

const double = (hex: string): number => Buffer.from(hex, 'hex').readDoubleBE();

describe('RFC 8785', () => {
  test('the sample object of section 3.2.2', () => {
    const input = String.raw`{"numbers":[333333333.33333329,1E30,4.50,2e-3,0.000000000000000000000000001],"string":"\u20ac$\u000F\u000aA'\u0042\u0022\u005c\\\"\/","literals":[null,true,false]}`;
    expect(canonicalJson(JSON.parse(input))).toBe(String.raw`{"literals":[null,true,false],"numbers":[333333333.3333333,1e+30,4.5,0.002,1e-27],"string":"€$\u000f\nA'B\"\\\\\"/"}`);
  });

  test('keys in order of UTF-16 code units, section 3.2.3', () => {
    const input = { '\u20ac': 'Euro Sign', '\r': 'Carriage Return', '\ufb33': 'Hebrew Letter Dalet With Dagesh', '1': 'One', '\ud83d\ude00': 'Emoji: Grinning Face', '\u0080': 'Control', '\u00f6': 'Latin Small Letter O With Diaeresis' };
    const values = [...canonicalJson(input).matchAll(/:"([^"]*)"/g)].map((match) => match[1]);
    expect(values).toEqual(['Carriage Return', 'One', 'Control', 'Latin Small Letter O With Diaeresis', 'Euro Sign', 'Emoji: Grinning Face', 'Hebrew Letter Dalet With Dagesh']);
  });

  test('keys that look like numbers sort as text: "10" before "2"', () => {
    expect(canonicalJson({ 2: 0, 10: 0, '': 0 })).toBe('{"":0,"10":0,"2":0}');
  });

  // RFC 8785, appendix B; memory.
  test.each([
    ['0000000000000000', '0'], ['8000000000000000', '0'], ['0000000000000001', '5e-324'], ['8000000000000001', '-5e-324'],
    ['7fefffffffffffff', '1.7976931348623157e+308'], ['ffefffffffffffff', '-1.7976931348623157e+308'],
    ['4340000000000000', '9007199254740992'], ['c340000000000000', '-9007199254740992'], ['4430000000000000', '295147905179352830000'],
    ['44b52d02c7e14af5', '9.999999999999997e+22'], ['44b52d02c7e14af6', '1e+23'], ['44b52d02c7e14af7', '1.0000000000000001e+23'],
    ['444b1ae4d6e2ef4e', '999999999999999700000'], ['444b1ae4d6e2ef4f', '999999999999999900000'], ['444b1ae4d6e2ef50', '1e+21'],
    ['3eb0c6f7a0b5ed8c', '9.999999999999997e-7'], ['3eb0c6f7a0b5ed8d', '0.000001'],
    ['41b3de4355555553', '333333333.3333332'], ['41b3de4355555554', '333333333.33333325'], ['41b3de4355555555', '333333333.3333333'],
    ['41b3de4355555556', '333333333.3333334'], ['41b3de4355555557', '333333333.33333343'],
    ['becbf647612f3696', '-0.0000033333333333333333'], ['43143ff3c1cb0959', '1424953923781206.2'],
  ])('the double %s is written %s', (hex, text) => {
    expect(canonicalJson(double(hex))).toBe(text);
    expect(canonicalJson([double(hex)])).toBe(`[${text}]`);
  });

  test.each([['7fffffffffffffff'], ['7ff0000000000000'], ['fff0000000000000']])('the double %s has no form', (hex) => {
    expect(() => canonicalJson({ a: double(hex) })).toThrow();
  });

  test('half a surrogate pair has no form, as value or key, short or long', () => {
    for (const bad of ['\ud800', 'x'.repeat(60) + '\udc00']) {
      expect(() => canonicalJson(bad)).toThrow();
      expect(() => canonicalJson({ [bad]: 1 })).toThrow();
    }
  });
});

test('the quick writer and the library write the same, whatever the value', () => {
  const anything = fc.anything({ withBigInt: false, withDate: false, withMap: false, withSet: false, withTypedArray: false, withNullPrototype: false, withSparseArray: false, values: [fc.string({ unit: 'binary' }), fc.double({ noNaN: true, noDefaultInfinity: true }), fc.integer(), fc.boolean(), fc.constant(null)] });
  fc.assert(fc.property(anything, (value) => {
    expect(canonicalJson(value)).toBe(canonicalJsonByLibrary(value));
  }), { seed: 1, numRuns: 3000 });
});

test('members without a value are left out, as the library does', () => {
  const value = { b: undefined, a: [undefined, 1], c: {} };
  expect(canonicalJson(value)).toBe('{"a":[null,1],"c":{}}');
  expect(canonicalJson(value)).toBe(canonicalJsonByLibrary(value));
  expect(() => canonicalJson(undefined)).toThrow(TypeError);
});

describe('content id', () => {
  test('is SHA-256 of the UTF-8 canonical form, by another implementation of SHA-256', () => {
    const value = { title: 'Grüße 😀', list: Array.from({ length: 40_000 }, (_, i) => `label ${i} 😀`) };
    expect(contentIdOf(value)).toBe(createHash('sha256').update(canonicalJsonByLibrary(value), 'utf8').digest('hex'));
  });

  test('does not depend on spelling, blanks or order of keys', () => {
    fc.assert(fc.property(fc.dictionary(fc.string(), fc.jsonValue()), (value) => {
      const turned = Object.fromEntries(Object.entries(value).reverse());
      expect(contentIdOf(turned)).toBe(contentIdOf(value));
    }), { seed: 1 });
    expect(contentIdOf(JSON.parse('{"b":1.0,"a":"\\u0041"}'))).toBe(contentIdOf(JSON.parse(' { "a" : "A", "b" : 1 } ')));
  });

  test('SHA-256 of nothing and of "abc" (FIPS 180-4)', () => {
    expect(sha256Hex(new Uint8Array())).toBe('e3b0c44298fc1c149afbf4c8996fb92427ae41e4649b934ca495991b7852b855');
    expect(sha256Hex(new TextEncoder().encode('abc'))).toBe('ba7816bf8f01cfea414140de5dae2223b00361a396177a9cb410ff61f20015ad');
  });
});
