import { STATUS_CODES } from 'node:http';
import { describe, expect, test } from 'vitest';
import { AppError } from '#shared/errors/app-error.ts';
import { errorCodes, isErrorCode } from '#shared/errors/codes.ts';

describe('the closed set of error codes', () => {
  test.each(Object.entries(errorCodes))('%s has a client or server status known to HTTP, a title and help', (code, entry) => {
    expect(code).toMatch(/^[a-z]+(-[a-z]+)*$/);
    expect(STATUS_CODES[entry.status]).toBeDefined();
    expect(entry.status).toBeGreaterThanOrEqual(400);
    expect(entry.title).toMatch(/^[A-Z][^.]*$/);
    expect(entry.help).toMatch(/\.$/);
  });

  test('isErrorCode knows own codes only, not what every object inherits', () => {
    expect(isErrorCode('not-found')).toBe(true);
    expect(isErrorCode('constructor')).toBe(false);
    expect(isErrorCode('no-such-code')).toBe(false);
  });
});

describe('AppError', () => {
  const details = [{ pointer: '/shots', message: 'shots must be at least 1; it is 0.' }];

  test('takes status, title and type from its code and the rest from the case', () => {
    const error = new AppError('unusable-file', 'The dataset has one fault.', details);
    expect(error).toBeInstanceOf(Error);
    expect(error.toProblem()).toEqual({
      type: '/problems/unusable-file', title: 'The file breaks the format', status: 422, detail: 'The dataset has one fault.', errors: details,
    });
  });

  test('a problem without faults to list has no errors member', () => {
    expect(new AppError('not-found', 'No entry has the accession EVB-000042.').toProblem()).not.toHaveProperty('errors');
  });

  test('keeps its cause for the log, not for the answer', () => {
    const cause = new Error('connection refused');
    const error = new AppError('unavailable', 'The database does not answer.', [], { cause });
    expect(error.cause).toBe(cause);
    expect(JSON.stringify(error.toProblem())).not.toContain('refused');
  });
});
