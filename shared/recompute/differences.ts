import type { Agreement, Difference } from './types.ts';

/** Numbers nearer than this, relative to max(1, |x|), count as close: far above rounding, far below any figure's digits. */
export const CLOSE = 1e-9;

const isObject = (value: unknown): value is Record<string, unknown> => typeof value === 'object' && value !== null;
const escaped = (key: string): string => key.replaceAll('~', '~0').replaceAll('/', '~1');

/** Every place at which two JSON values are not identical, by JSON Pointer. Cost: linear in their size. */
export function differencesOf(frozen: unknown, again: unknown, pointer = ''): Difference[] {
  if (isObject(frozen) && isObject(again) && Array.isArray(frozen) === Array.isArray(again)) {
    const keys = new Set([...Object.keys(frozen), ...Object.keys(again)]);
    return [...keys].flatMap((key) => differencesOf(frozen[key], again[key], `${pointer}/${escaped(key)}`));
  }
  if (frozen === again) return [];
  return [{ pointer, frozen, again, gap: typeof frozen === 'number' && typeof again === 'number' ? Math.abs(frozen - again) : null }];
}

const isClose = ({ frozen, again, gap }: Difference): boolean => gap !== null && gap <= CLOSE * Math.max(1, Math.abs(frozen as number), Math.abs(again as number));

export function agreementOf(differences: readonly Difference[]): Agreement {
  if (differences.length === 0) return 'identical';
  return differences.every(isClose) ? 'close' : 'differs';
}

/** The least agreement of several. */
export function worstOf(agreements: readonly Agreement[]): Agreement {
  if (agreements.includes('differs')) return 'differs';
  return agreements.includes('close') ? 'close' : 'identical';
}

/** The largest gap among differences, null where none is between numbers. */
export function largestGap(differences: readonly Difference[]): number | null {
  return differences.reduce<number | null>((most, { gap }) => (gap === null ? most : Math.max(most ?? 0, gap)), null);
}
