import { createHash, createHmac } from 'node:crypto';
import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { gateClassById } from '#shared/domain/gate-classes.ts';
import { readSeal } from '#shared/formats/read-seal.ts';
import type { RunSheet, Seal } from '#shared/formats/types.ts';
import { drawSheet } from '#shared/runsheet/draw-sheet.ts';
import { checkSeal, commitmentOf, openSeal, sealedIds } from '#shared/runsheet/seal.ts';
import { bytesOf } from '../formats/samples.ts';

const secret = Uint8Array.from({ length: 32 }, (_, i) => 7 * i + 1);
const quarter = gateClassById('quarter-turn-1q/1');

function issuedSheet(): { sheet: RunSheet; secret: Uint8Array } {
  if (!quarter) throw new Error('the class is shipped');
  const drawn = drawSheet({ gateClass: quarter, register: ['q3'], circuits: 60, shots: 500, seed: '01', issued: { id: 'RS-000123', device: { provider: 'Larkspur Quantics', name: 'Meadow-5' }, drawnAt: '2026-05-01T08:00:00Z' }, newSecret: () => secret });
  return { sheet: drawn.sheet, secret };
}

describe('choice of the sealed circuits', () => {
  test('the smallest HMAC-SHA256 of the ids, by another implementation of HMAC', () => {
    fc.assert(fc.property(fc.uniqueArray(fc.string({ minLength: 1, unit: 'grapheme' }), { maxLength: 40 }), fc.uint8Array({ minLength: 32, maxLength: 32 }), fc.nat(40), (ids, key, count) => {
      const expected = ids.map((id) => ({ id, tag: createHmac('sha256', key).update(id, 'utf8').digest() })).sort((a, b) => Buffer.compare(a.tag, b.tag)).slice(0, count).map(({ id }) => id);
      expect(sealedIds(key, ids.map((id) => ({ id })), count)).toEqual(expected);
    }), { seed: 1, numRuns: 300 });
  });

  test('HMAC-SHA256 of RFC 4231, case 1, decides as the RFC prints it', () => {
    // Key 0b × 20, data "Hi There": tag b0344c61…; memory.
    expect(createHmac('sha256', Buffer.alloc(20, 0x0b)).update('Hi There').digest('hex')).toMatch(/^b0344c61/);
    const smaller = sealedIds(new Uint8Array(20).fill(0x0b), [{ id: 'Hi There' }, { id: 'x' }], 1);
    const tagOfX = createHmac('sha256', Buffer.alloc(20, 0x0b)).update('x').digest('hex');
    expect(smaller).toEqual([tagOfX < 'b0344c61' ? 'x' : 'Hi There']);
  });

  test('does not depend on the order of the circuits', () => {
    const ids = Array.from({ length: 30 }, (_, i) => ({ id: `c${i}` }));
    expect(sealedIds(secret, [...ids].reverse(), 8)).toEqual(sealedIds(secret, ids, 8));
  });

  test('the commitment is SHA-256 of the 32 bytes, not of their hex', () => {
    expect(commitmentOf(secret)).toBe(createHash('sha256').update(secret).digest('hex'));
  });
});

describe('opening and checking', () => {
  test('an opened seal fits its sheet; the secret is nowhere on the sheet', () => {
    const { sheet } = issuedSheet();
    const seal = openSeal(sheet, secret);
    expect(checkSeal(seal, sheet)).toEqual([]);
    expect(seal.sealed).toHaveLength(15);
    expect(JSON.stringify(sheet)).not.toContain(seal.secret);
  });

  test('another secret, or a sheet without a number, cannot be opened', () => {
    const { sheet } = issuedSheet();
    expect(() => openSeal(sheet, new Uint8Array(32).fill(9))).toThrow('RS-000123');
    expect(() => openSeal({ ...sheet, id: null }, secret)).toThrow('no seal');
  });

  test.each<[string, (seal: Seal) => Partial<Seal>, string, string]>([
    ['another sheet', () => ({ runSheet: 'RS-000124' }), '/runSheet', '"RS-000124"'],
    ['another commitment', () => ({ sealSha256: 'a'.repeat(64) }), '/sealSha256', 'not the one printed'],
    ['one circuit fewer', ({ sealed }) => ({ sealed: sealed.slice(1) }), '/sealed', 'seals 15 circuits'],
    ['another secret under the right commitment', () => ({ secret: '00'.repeat(32) }), '/sealSha256', 'SHA-256 of the secret'],
    ['a circuit that was not chosen', ({ sealed }) => ({ sealed: [...sealed.slice(1), ['c0001', 'c0002', 'c0003', 'c0004', 'c0005'].find((id) => !sealed.includes(id)) ?? ''] }), '/sealed/14', 'was not chosen by the secret'],
  ])('%s is found', (_, change, pointer, words) => {
    const { sheet } = issuedSheet();
    const seal = openSeal(sheet, secret);
    const errors = checkSeal({ ...seal, ...change(seal) }, sheet);
    expect(errors.find((error) => error.pointer === pointer && error.message.includes(words)), JSON.stringify(errors)).toBeDefined();
  });
});

describe('reading a seal beside a dataset', () => {
  const { sheet } = issuedSheet();
  const seal = openSeal(sheet, secret);
  const dataset = { runSheet: { id: 'RS-000123', sha256: '0'.repeat(64) }, patches: sheet.patches.map(({ qubits, circuits }) => ({ qubits, circuits: circuits.map((circuit) => ({ ...circuit, shots: 1, counts: { 0: 1 } })) })) };

  test('a good seal is taken', () => {
    expect(readSeal(bytesOf(seal), dataset)).toEqual({ ok: true, seal });
  });

  test.each<[string, unknown, string, string]>([
    ['no JSON', 'x', '', 'must be an object'],
    ['a secret of 31 bytes', { ...seal, secret: seal.secret.slice(2) }, '/secret', '64 hexadecimal digits'],
    ['no circuit sealed', { ...seal, sealed: [] }, '/sealed', 'at least 1 item'],
    ['a circuit twice', { ...seal, sealed: [...seal.sealed, seal.sealed[0]] }, '/sealed/15', 'same item twice'],
    ['another sheet', { ...seal, runSheet: 'RS-000999' }, '/runSheet', 'names the run sheet "RS-000123"'],
    ['a circuit that the dataset does not have', { ...seal, sealed: [...seal.sealed, 'zz'] }, '/sealed/15', 'No circuit has the id "zz"'],
  ])('%s is refused', (_, file, pointer, words) => {
    const reading = readSeal(bytesOf(file), dataset);
    expect(reading.ok ? [] : reading.errors).toEqual([{ pointer, message: expect.stringContaining(words) as string }]);
  });

  test('a dataset without a run sheet takes no seal', () => {
    const reading = readSeal(bytesOf(seal), { ...dataset, runSheet: null });
    expect(reading).toMatchObject({ ok: false, errors: [{ pointer: '/runSheet', message: expect.stringContaining('names no run sheet') as string }] });
  });
});
