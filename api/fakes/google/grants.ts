import { createHash, randomBytes } from 'node:crypto';

interface Grant<T> {
  value: T;
  until: number;
}

/** Short-lived one-time or bearer values, in memory. */
export class Grants<T> {
  readonly #held = new Map<string, Grant<T>>();

  constructor(private readonly lifeMs: number) {}

  give(value: T): string {
    const now = Date.now();
    for (const [key, grant] of this.#held) if (grant.until < now) this.#held.delete(key);
    const key = randomBytes(24).toString('base64url');
    this.#held.set(key, { value, until: now + this.lifeMs });
    return key;
  }

  look(key: string): T | null {
    const grant = this.#held.get(key);
    return grant && grant.until >= Date.now() ? grant.value : null;
  }

  /** Looks and forgets: good for one use. */
  take(key: string): T | null {
    const value = this.look(key);
    this.#held.delete(key);
    return value;
  }
}

/** RFC 7636, method S256: BASE64URL(SHA-256(verifier)). */
export const challengeOf = (verifier: string): string => createHash('sha256').update(verifier).digest('base64url');
