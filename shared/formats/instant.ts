const parts = /^([0-9]{4})-([0-9]{2})-([0-9]{2})T([0-9]{2}):([0-9]{2}):([0-9]{2})(\.[0-9]{1,9})?(?:Z|([+-])([0-9]{2}):([0-9]{2}))$/;

/**
 * Milliseconds since 1970 of an RFC 3339 instant, or null where the calendar has no such day or the clock no such time.
 * Date.parse alone would turn 30 February into 1 or 2 March.
 */
export function instantOf(text: string): number | null {
  const match = parts.exec(text);
  if (!match) return null;
  const [year, month, day, hour, minute, second] = match.slice(1, 7).map(Number) as [number, number, number, number, number, number];
  const [offsetHours, offsetMinutes] = [Number(match[9] ?? 0), Number(match[10] ?? 0)];
  if (hour > 23 || minute > 59 || second > 59 || offsetHours > 23 || offsetMinutes > 59) return null;
  const utc = new Date(0);
  utc.setUTCFullYear(year, month - 1, day);
  if (utc.getUTCFullYear() !== year || utc.getUTCMonth() !== month - 1 || utc.getUTCDate() !== day) return null;
  const offset = (match[8] === '-' ? -1 : 1) * (offsetHours * 60 + offsetMinutes);
  return utc.getTime() + (hour * 3600 + (minute - offset) * 60 + second) * 1000 + Number(match[7] ?? 0) * 1000;
}
