import { describe, expect, it } from 'vitest';
import { BoundedCache } from '#api/lib/bounded-cache.ts';

describe('a bounded cache', () => {
  it('makes an answer once for all who ask, also while it is being made', async () => {
    const cache = new BoundedCache<number>(2);
    let made = 0;
    const ask = () => cache.get('a', () => Promise.resolve((made += 1)));
    expect(await Promise.all([ask(), ask(), ask()])).toEqual([1, 1, 1]);
  });

  it('keeps as many as it may; the one not asked for longest goes', async () => {
    const cache = new BoundedCache<string>(2);
    const made: string[] = [];
    const ask = (key: string) => cache.get(key, () => Promise.resolve((made.push(key), key)));
    for (const key of ['a', 'b', 'a', 'c', 'a', 'b']) await ask(key);
    expect(made).toEqual(['a', 'b', 'c', 'b']);
  });

  it('does not keep a failure', async () => {
    const cache = new BoundedCache<number>(2);
    await expect(cache.get('a', () => Promise.reject(new Error('no database')))).rejects.toThrow('no database');
    expect(await cache.get('a', () => Promise.resolve(7))).toBe(7);
  });
});
