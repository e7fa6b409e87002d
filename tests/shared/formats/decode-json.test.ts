import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { decodeJson } from '#shared/formats/decode-json.ts';
import { limits } from '#shared/formats/limits.ts';
import { firstBadByte } from '#shared/formats/utf8.ts';

const bytesOf = (text: string): Uint8Array => new TextEncoder().encode(text);
const decode = (text: string) => decodeJson(bytesOf(text));

/** Pointer and sentence of the first fault; null where the text is taken. */
function fault(input: string | Uint8Array): { pointer: string; message: string } | null {
  const decoded = decodeJson(typeof input === 'string' ? bytesOf(input) : input);
  return decoded.ok ? null : (decoded.errors[0] ?? null);
}

describe('what is refused although JSON.parse would take it', () => {
  test.each([
    ['a key named twice', '{"a":1,"b":{"c":1,"c":2}}', '/b/c', '"c" stands here twice'],
    ['a key named twice by way of an escape', '{"a":1,"\\u0061":2}', '/a', 'twice'],
    ['__proto__', '{"x":[{"__proto__":{"admin":true}}]}', '/x/0/__proto__', '__proto__'],
    ['constructor', '{"constructor":1}', '/constructor', 'constructor'],
    ['prototype', '{"prototype":1}', '/prototype', 'prototype'],
    ['a number beyond double', '{"a":[0,1e400]}', '/a/1', '1e400'],
    ['a number below double', '[1e-400]', '/0', 'would become 0'],
    ['a whole number above 2^53 − 1', '[9007199254740992]', '/0', '9007199254740992'],
    ['a whole number below −(2^53 − 1)', '{"n":-9007199254740993}', '/n', '-9007199254740993'],
    ['half a surrogate pair', '["\\ud800"]', '/0', 'surrogate'],
    ['half a surrogate pair in a key', '{"a\\udc00":1}', '', 'surrogate'],
    ['nesting of 33', '['.repeat(33) + ']'.repeat(33), '/0'.repeat(32), 'deeper than 32'],
  ])('%s', (_, text, pointer, words) => {
    expect(() => JSON.parse(text) as unknown).not.toThrow();
    expect(fault(text)).toEqual({ pointer, message: expect.stringContaining(words) as string });
  });

  test('a byte-order mark', () => {
    expect(fault(Uint8Array.of(0xef, 0xbb, 0xbf, 0x7b, 0x7d))?.message).toContain('byte-order mark');
  });

  test('more than 64 MiB, told in bytes', () => {
    expect(fault(new Uint8Array(limits.bytes + 1).fill(0x20))?.message).toContain('67108865');
  });

  test('more arrays than any dataset could hold', () => {
    const message = fault(`[${'[],'.repeat(limits.containers)}[]]`)?.message;
    expect(message).toContain('more than');
  });
});

describe('syntax faults tell line and column', () => {
  test.each([
    ['', '', 'line 1, column 1'],
    ['{\n  "a": 1,\n  "b": tru\n}', '/b', 'line 3, column 8'],
    ['{"a":1,}', '', 'line 1, column 8'],
    ['[1,]', '/1', 'line 1, column 4'],
    ['[1 2]', '/0', 'line 1, column 4'],
    ['[01]', '/0', 'line 1, column 2'],
    ['[1.]', '/0', 'column 3'],
    ['[.5]', '/0', 'column 2'],
    ['[+1]', '/0', 'column 2'],
    ['[-]', '/0', 'column 2'],
    ['[1e]', '/0', 'column 3'],
    ['[NaN]', '/0', 'column 2'],
    ["{'a':1}", '', 'column 2'],
    ['{"a" 1}', '', 'column 6'],
    ['["a\nb"]', '/0', 'line 1, column 4'],
    ['["\\x41"]', '/0', 'column 2'],
    ['["abc', '/0', 'ends inside a string'],
    ['["abc\\', '/0', 'ends inside a string'],
    ['[1] []', '', 'goes on after its end'],
    ['\u00a0[1]', '', 'column 1'],
    ['{"a":[{"b":1]}', '/a/0/b', 'column 13'],
  ])('%j', (text, pointer, words) => {
    expect(() => JSON.parse(text) as unknown).toThrow();
    const found = fault(text);
    expect(found?.pointer).toBe(pointer);
    expect(found?.message).toContain(words);
  });
});

describe('UTF-8 is read strictly (RFC 3629)', () => {
  test.each([
    ['a lone continuation byte', [0x80], 0],
    ['a sequence cut short', [0x61, 0xe2, 0x82], 1],
    ['an over-long slash', [0xc0, 0xaf], 0],
    ['an over-long euro sign', [0xf0, 0x82, 0x82, 0xac], 0],
    ['a surrogate', [0xed, 0xa0, 0x80], 0],
    ['beyond U+10FFFF', [0xf4, 0x90, 0x80, 0x80], 0],
    ['FE', [0x61, 0x62, 0xfe], 2],
  ])('%s is refused at its byte', (_, bytes, offset) => {
    expect(fault(Uint8Array.from(bytes))?.message).toContain(`byte ${offset + 1} `);
  });

  test('the own search for the bad byte agrees with the platform decoder on whether there is one', () => {
    fc.assert(fc.property(fc.uint8Array({ maxLength: 12 }), (bytes) => {
      let ok = true;
      try { new TextDecoder('utf-8', { fatal: true, ignoreBOM: true }).decode(bytes); } catch { ok = false; }
      expect(firstBadByte(bytes) === bytes.length).toBe(ok);
    }), { seed: 1, numRuns: 5000 });
  });
});

test('faults of values are gathered, at most 50', () => {
  const decoded = decode(`[${'1e999,'.repeat(70)}1]`);
  expect(decoded.ok ? 0 : decoded.errors.length).toBe(50);
});

test('minus zero is zero, so that equal content ids mean equal values', () => {
  const decoded = decode('[-0, -0.0, 0e5]');
  expect(decoded.ok && (decoded.value as number[]).every((x) => Object.is(x, 0))).toBe(true);
});

test('a key that every object inherits is an ordinary key', () => {
  const decoded = decode('{"toString":1,"hasOwnProperty":2}');
  expect(decoded).toEqual({ ok: true, value: JSON.parse('{"toString":1,"hasOwnProperty":2}') as unknown });
});

/** JSON values whose numbers are finite and whose keys are harmless. */
const jsonValue = fc.jsonValue({ maxDepth: 6 }).filter((value) => !/"(__proto__|constructor|prototype)":/.test(JSON.stringify(value)));

test('reads back what JSON.stringify writes, with any blanks', () => {
  fc.assert(fc.property(jsonValue, fc.constantFrom(0, 1, 2, '\t'), (value, indent) => {
    const text = JSON.stringify(value, null, indent);
    const decoded = decode(text);
    const hasWideInteger = /(?<![.\deE+-])-?\d{16,}(?![.\deE])/.test(text);
    if (!hasWideInteger) expect(decoded).toEqual({ ok: true, value: JSON.parse(text) as unknown });
  }), { seed: 2, numRuns: 2000 });
});

test('never takes a text that JSON.parse refuses, and reads the same from one that both take', () => {
  const mutated = fc.tuple(jsonValue, fc.array(fc.tuple(fc.nat(200), fc.constantFrom('', ',', '"', '\\', '{', '}', '[', ']', ':', '0', '-', '.', 'e', 'u', 'n', '\n', ' ')), { maxLength: 3 }));
  fc.assert(fc.property(mutated, ([value, edits]) => {
    let text = JSON.stringify(value);
    for (const [at, put] of edits) text = text.slice(0, at % (text.length + 1)) + put + text.slice((at % (text.length + 1)) + 1);
    let parsed: unknown;
    let valid = true;
    try { parsed = JSON.parse(text); } catch { valid = false; }
    const decoded = decode(text);
    if (!valid) expect(decoded.ok).toBe(false);
    else if (decoded.ok) expect(JSON.stringify(decoded.value)).toBe(JSON.stringify(parsed));
    else for (const { message } of decoded.errors) expect(message).toMatch(/twice|2\^53|double|called|surrogate/);
  }), { seed: 3, numRuns: 5000 });
});
