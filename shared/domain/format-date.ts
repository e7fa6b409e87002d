/** Dates as 2026-05-04, times in UTC. Built from the text or the UTC fields, never from the reader's time zone. */
const iso = (at: string): string => new Date(at).toISOString();

export const formatDate = (at: string): string => iso(at).slice(0, 10);
const clock = (at: string): string => iso(at).slice(11, 16);

/** "2026-05-04, 08:00 UTC" */
export const formatTime = (at: string): string => `${formatDate(at)}, ${clock(at)} UTC`;

/** "2026-05-04 08:00 to 09:10 UTC"; over midnight both days are named. */
export const formatSpan = (from: string, to: string): string =>
  formatDate(from) === formatDate(to) ? `${formatDate(from)} ${clock(from)} to ${clock(to)} UTC` : `${formatDate(from)} ${clock(from)} to ${formatDate(to)} ${clock(to)} UTC`;
