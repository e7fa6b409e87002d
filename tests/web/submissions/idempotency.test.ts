import { describe, expect, it } from 'vitest';
import { dropKey, keyForFile, type KeyStore } from '#web/features/submissions/idempotency.ts';

const memory = (): KeyStore => {
  const kept = new Map<string, string>();
  return { getItem: (name) => kept.get(name) ?? null, setItem: (name, value) => void kept.set(name, value), removeItem: (name) => void kept.delete(name) };
};

describe('the idempotency key of a file', () => {
  it('stays the same at every retry of the same content for the same organisation', () => {
    const store = memory();
    const first = keyForFile(store, 'o', 'c1');
    expect(keyForFile(store, 'o', 'c1')).toBe(first);
    expect(keyForFile(store, 'o', 'c2')).not.toBe(first);
    expect(keyForFile(store, 'p', 'c1')).not.toBe(first);
  });

  it('is made anew once the matter is settled', () => {
    const store = memory();
    const first = keyForFile(store, 'o', 'c1');
    dropKey(store, 'o', 'c1');
    expect(keyForFile(store, 'o', 'c1')).not.toBe(first);
  });
});
