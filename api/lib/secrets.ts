import { createHash, randomBytes, timingSafeEqual } from 'node:crypto';

/** 256 random bits, safe in headers and addresses. */
export const newSecret = (prefix = ''): string => prefix + randomBytes(32).toString('base64url');

/** What is kept of a secret. It has full entropy, so one plain hash is enough. */
export const secretSha256 = (secret: string): string => createHash('sha256').update(secret).digest('hex');

/** Compares without telling by time where two strings differ. */
export const sameSecret = (a: string, b: string): boolean => {
  const [x, y] = [Buffer.from(secretSha256(a)), Buffer.from(secretSha256(b))];
  return timingSafeEqual(x, y);
};
