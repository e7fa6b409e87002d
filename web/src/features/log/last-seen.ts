import { z } from 'zod';
import { sha256 } from '#shared/contracts/common.ts';

/** The head that this browser found sound last: what a later log must begin with. */
const seenHead = z.object({ treeSize: z.number().int().min(1), rootHash: sha256, keyId: sha256, seenAt: z.string() });
export type SeenHead = z.infer<typeof seenHead>;

const key = 'evenbeam.log-head';

export const readSeenHead = (): SeenHead | null => {
  try {
    const parsed = seenHead.safeParse(JSON.parse(localStorage.getItem(key) ?? 'null'));
    return parsed.success ? parsed.data : null;
  } catch {
    return null; // storage closed, or not ours
  }
};

/** Returns false where the browser keeps nothing. */
export const keepSeenHead = (head: SeenHead): boolean => {
  try {
    localStorage.setItem(key, JSON.stringify(head));
    return true;
  } catch {
    return false;
  }
};
