import type { z } from 'zod';
import { AppError, type ErrorDetail } from '#shared/errors/app-error.ts';

type Part = 'path' | 'query' | 'body';

const shown = (value: unknown): string => {
  if (value === undefined) return '';
  const text = JSON.stringify(value) ?? String(value);
  return ` Given: ${text.length > 80 ? `${text.slice(0, 80)}…` : text}.`;
};

const valueAt = (input: unknown, path: readonly PropertyKey[]): unknown =>
  path.reduce<unknown>((value, key) => (typeof value === 'object' && value !== null ? (value as Record<PropertyKey, unknown>)[key] : undefined), input);

const pointerOf = (path: readonly PropertyKey[]): string => path.map((key) => `/${String(key).replaceAll('~', '~0').replaceAll('/', '~1')}`).join('');

/** Most faults listed at once. */
const most = 50;

/** Place of the first text that holds the character U+0000, which no text column can keep; null where there is none. */
const nulPlace = (value: unknown, path: readonly PropertyKey[] = []): readonly PropertyKey[] | null => {
  if (typeof value === 'string') return value.includes('\u0000') ? path : null;
  if (typeof value !== 'object' || value === null) return null;
  for (const [key, inner] of Object.entries(value)) {
    const found = key.includes('\u0000') ? path : nulPlace(inner, [...path, key]);
    if (found) return found;
  }
  return null;
};

const placeOf = (part: Part, path: readonly PropertyKey[]): string => (part === 'body' ? '' : `${part === 'path' ? 'In the address' : 'In the query'}, ${path.map(String).join('.')}: `);

const refuseNul = (input: unknown, part: Part): void => {
  const path = nulPlace(input);
  if (!path) return;
  const pointer = part === 'body' ? pointerOf(path) : '';
  const message = `${placeOf(part, path)}the character U+0000 cannot be kept in a text.${shown(valueAt(input, path))}`;
  throw new AppError('invalid-request', `${pointer ? `${pointer}: ` : ''}${message}`, [{ pointer, message }]);
};

/** Parses one part of a request; all its faults are told at once, each with its place and the value given. */
export const validate = <S extends z.ZodType>(schema: S, input: unknown, part: Part): z.output<S> => {
  refuseNul(input, part);
  const parsed = schema.safeParse(input);
  if (parsed.success) return parsed.data;
  const details: ErrorDetail[] = parsed.error.issues.slice(0, most).map((issue) => {
    const sentence = issue.message.replace(/\.$/, '');
    return { pointer: part === 'body' ? pointerOf(issue.path) : '', message: `${placeOf(part, issue.path)}${sentence}.${shown(valueAt(input, issue.path))}` };
  });
  const first = details[0];
  throw new AppError('invalid-request', `${first?.pointer ? `${first.pointer}: ` : ''}${first?.message ?? 'The request cannot be read.'}${details.length > 1 ? ` And ${details.length - 1} more.` : ''}`, details);
};
