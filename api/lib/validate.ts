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

/** Parses one part of a request; all its faults are told at once, each with its place and the value given. */
export const validate = <S extends z.ZodType>(schema: S, input: unknown, part: Part): z.output<S> => {
  const parsed = schema.safeParse(input);
  if (parsed.success) return parsed.data;
  const details: ErrorDetail[] = parsed.error.issues.slice(0, most).map((issue) => {
    const place = part === 'body' ? '' : `${part === 'path' ? 'In the address' : 'In the query'}, ${issue.path.map(String).join('.')}: `;
    const sentence = issue.message.replace(/\.$/, '');
    return { pointer: part === 'body' ? pointerOf(issue.path) : '', message: `${place}${sentence}.${shown(valueAt(input, issue.path))}` };
  });
  const first = details[0];
  throw new AppError('invalid-request', `${first?.pointer ? `${first.pointer}: ` : ''}${first?.message ?? 'The request cannot be read.'}${details.length > 1 ? ` And ${details.length - 1} more.` : ''}`, details);
};
