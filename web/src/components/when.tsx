import { formatDate, formatTime } from '#shared/domain/format-date.ts';

/** A day of the record; the exact moment is in its `datetime` and, with `exact`, on screen. */
export function When({ at, exact = false }: { at: string; exact?: boolean }) {
  return <time dateTime={at} className="nowrap">{exact ? formatTime(at) : formatDate(at)}</time>;
}
