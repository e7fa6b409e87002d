import type { Request } from 'express';
import { AppError } from '#shared/errors/app-error.ts';
import type { Caller } from '#api/lib/caller.ts';
import { sameSecret } from '#api/lib/secrets.ts';

const changing = new Set(['POST', 'PUT', 'PATCH', 'DELETE']);

/**
 * A change asked for by a session must come from the registry's own pages: the Origin header, where the browser
 * sends one, names this registry, and `x-csrf-token` carries the session's token. API tokens are exempt: a
 * browser never sends them by itself.
 */
export const refuseForgery = (request: Request, caller: Caller, publicUrl: string): void => {
  if (!changing.has(request.method) || caller.user === null) return;
  const origin = request.get('origin');
  const own = [new URL(publicUrl).origin, `${request.protocol}://${request.get('host') ?? ''}`];
  if (origin !== undefined && !own.includes(origin)) throw new AppError('origin-refused', `The request came from ${JSON.stringify(origin.slice(0, 200))}, not from the registry's own pages.`);
  const token = request.get('x-csrf-token') ?? '';
  if (caller.csrfToken === '' || !sameSecret(token, caller.csrfToken)) {
    throw new AppError('origin-refused', token === '' ? 'The x-csrf-token header is missing.' : 'The x-csrf-token header does not belong to this session. Load the page again and repeat the step.');
  }
};
