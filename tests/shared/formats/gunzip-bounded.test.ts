import { randomBytes } from 'node:crypto';
import { gzipSync } from 'node:zlib';
import { describe, expect, test } from 'vitest';
import { gunzipBounded } from '#api/lib/gunzip-bounded.ts';
import { AppError } from '#shared/errors/app-error.ts';
import { limits } from '#shared/formats/limits.ts';
import { gunzipBounded as gunzipInBrowser } from '#web/lib/gunzip-bounded.ts';

async function* inChunks(bytes: Uint8Array, size: number, onChunk: () => void = () => undefined): AsyncGenerator<Uint8Array> {
  for (let i = 0; i < bytes.length; i += size) {
    onChunk();
    yield bytes.subarray(i, i + size);
  }
}

/** 256 MiB of zeros: 255 kB of gzip. */
const bomb = gzipSync(Buffer.alloc(256 * 1024 * 1024));

const ways: [string, (bytes: Uint8Array, limit?: number) => Promise<Uint8Array>][] = [
  ['node, whole', (bytes, limit) => gunzipBounded(bytes, limit)],
  ['node, in chunks', (bytes, limit) => gunzipBounded(inChunks(bytes, 1000), limit)],
  ['browser', (bytes, limit) => gunzipInBrowser(new Blob([Uint8Array.from(bytes)]), limit)],
];

describe.each(ways)('gunzipBounded (%s)', (_, unpack) => {
  test('returns what was packed, also from several members', async () => {
    const data = randomBytes(300_000);
    expect(Buffer.compare(await unpack(gzipSync(data)), data)).toBe(0);
    const text = await unpack(gzipSync(Buffer.alloc(0)));
    expect(text.length).toBe(0);
  });

  test('exactly the limit passes, one byte more does not', async () => {
    expect((await unpack(gzipSync(Buffer.alloc(5000)), 5000)).length).toBe(5000);
    await expect(unpack(gzipSync(Buffer.alloc(5001)), 5000)).rejects.toMatchObject({ code: 'too-large' });
  });

  test('a bomb of 255 kB that would grow to 256 MiB is stopped at 64 MiB', async () => {
    expect(bomb.length).toBeLessThan(300_000);
    const error = await unpack(bomb).catch((e: unknown) => e);
    expect(error).toBeInstanceOf(AppError);
    expect(error).toMatchObject({ code: 'too-large', status: 413 });
    expect((error as AppError).message).toContain('64 MiB');
  });

  test.each([
    ['cut short', gzipSync(randomBytes(5000)).subarray(0, 3000)],
    ['no gzip at all', Buffer.from('{"format":"evenbeam.dataset"}')],
    ['a wrong checksum', (() => { const b = gzipSync(Buffer.from('hello world')); b[b.length - 6] = (b[b.length - 6] ?? 0) ^ 1; return b; })()],
    ['bytes after the end', Buffer.concat([gzipSync(Buffer.from('hello')), Buffer.from('garbage')])],
    ['nothing', Buffer.alloc(0)],
  ])('%s is refused as malformed', async (_name, bytes) => {
    await expect(unpack(bytes)).rejects.toMatchObject({ code: 'malformed-gzip' });
  });
});

test('a bomb stops the reading of its source, not only the keeping of what comes out', async () => {
  let chunks = 0;
  await gunzipBounded(inChunks(bomb, 1024, () => { chunks++; })).catch(() => undefined);
  expect(chunks).toBeLessThan(bomb.length / 1024 / 2);
});

test('input without end and without output is stopped as well', async () => {
  const empty = gzipSync(Buffer.alloc(0));
  async function* endless(): AsyncGenerator<Uint8Array> {
    const many = Buffer.concat(Array.from({ length: 1000 }, () => empty));
    for (;;) yield many;
  }
  await expect(gunzipBounded(endless(), 4096)).rejects.toMatchObject({ code: 'too-large' });
});

test('a fault of the source itself is passed on as it is', async () => {
  async function* broken(): AsyncGenerator<Uint8Array> {
    yield gzipSync(Buffer.from('x')).subarray(0, 5);
    throw new Error('connection reset');
  }
  await expect(gunzipBounded(broken())).rejects.toThrow('connection reset');
});

test('the limit is 64 MiB unless told', () => {
  expect(limits.bytes).toBe(67_108_864);
});
