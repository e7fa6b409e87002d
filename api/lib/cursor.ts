import { AppError } from '#shared/errors/app-error.ts';

/** A place in a list: the sort values of the last item given. Opaque to readers, checked when it comes back. */
export const writeCursor = (values: readonly (string | number)[]): string => Buffer.from(JSON.stringify(values)).toString('base64url');

const unusable = (text: string): AppError => new AppError('invalid-request', `In the query, cursor: ${JSON.stringify(text.slice(0, 80))} is not a cursor of this list. Take nextCursor of the page before.`);

/** Reads a cursor of so many text values; throws invalid-request for anything else. */
export const readCursor = (text: string | undefined, length: number): string[] | null => {
  if (text === undefined) return null;
  let values: unknown;
  try {
    values = JSON.parse(Buffer.from(text, 'base64url').toString('utf8'));
  } catch {
    throw unusable(text);
  }
  if (!Array.isArray(values) || values.length !== length || !values.every((v) => typeof v === 'string' && !v.includes('\u0000'))) throw unusable(text);
  return values as string[];
};

/** A cursor of an instant and a name, for lists by time. */
export const readTimeCursor = (text: string | undefined): { at: Date; id: string } | null => {
  const values = readCursor(text, 2);
  if (!values) return null;
  const [at = '', id = ''] = values;
  if (Number.isNaN(Date.parse(at))) throw unusable(text ?? '');
  return { at: new Date(at), id };
};

/** One item more than asked for is fetched; it tells whether there is a next page. */
export const pageFrom = <T, V>(rows: T[], limit: number, place: (row: T) => readonly (string | number)[], present: (row: T) => V): { items: V[]; nextCursor: string | null } => {
  const shown = rows.slice(0, limit);
  const last = shown.at(-1);
  return { items: shown.map(present), nextCursor: rows.length > limit && last !== undefined ? writeCursor(place(last)) : null };
};
