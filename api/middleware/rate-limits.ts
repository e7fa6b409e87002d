import type { RequestHandler } from 'express';
import { rateLimit } from 'express-rate-limit';
import { AppError } from '#shared/errors/app-error.ts';
import type { Limit } from '#api/lib/define-route.ts';

const minute = 60_000;

/**
 * Requests that one address may make in a window. Wide enough for a reader with several tabs and for a script
 * that pages through the registry; narrow enough that guessing and flooding do not pay. Counted per web process.
 */
const allowances: Record<Limit | 'sign-in', { windowMs: number; limit: number }> = {
  read: { windowMs: minute, limit: 600 },
  write: { windowMs: minute, limit: 120 },
  upload: { windowMs: 60 * minute, limit: 240 },
  'sign-in': { windowMs: 10 * minute, limit: 60 },
};

const open: RequestHandler = (_request, _response, next) => next();

/** One counter for each kind of request; with `enabled` false all let everything through. */
export const rateLimits = (enabled: boolean): Record<Limit | 'sign-in', RequestHandler> => {
  const counter = (kind: Limit | 'sign-in'): RequestHandler =>
    enabled
      ? rateLimit({
          ...allowances[kind],
          standardHeaders: 'draft-8',
          legacyHeaders: false,
          handler: (_request, _response, next) => next(new AppError('rate-limited', `More than ${allowances[kind].limit} requests of this kind came from your address in ${allowances[kind].windowMs / minute} min.`)),
        })
      : open;
  return { read: counter('read'), write: counter('write'), upload: counter('upload'), 'sign-in': counter('sign-in') };
};
