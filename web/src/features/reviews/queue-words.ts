import type { ReviewItem } from '#shared/contracts/reviews.ts';

const dayMs = 86_400_000;

/** "today", "1 day", "4 days": how long a submission has waited, in whole days. */
export const waitingWords = (sentAt: string, now: Date): string => {
  const days = Math.max(0, Math.floor((now.getTime() - Date.parse(sentAt)) / dayMs));
  return days === 0 ? 'sent today' : `${days} ${days === 1 ? 'day' : 'days'}`;
};

/** "returned once" from the second round on. */
export const roundWords = (round: number): string | null => {
  if (round <= 1) return null;
  return round === 2 ? 'returned once' : `returned ${round - 1} times`;
};

/** The case to read after this one: the next in the order of the queue, else the first left; null when none is. */
export const nextInQueue = (items: readonly ReviewItem[], current: string): ReviewItem | null => {
  const at = items.findIndex((item) => item.id === current);
  const rest = items.filter((item) => item.id !== current);
  const following = at === -1 ? rest : [...items.slice(at + 1), ...items.slice(0, at)];
  return following.find((item) => item.claimedBy === null || item.claimedByMe) ?? following[0] ?? null;
};
