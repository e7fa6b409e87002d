import type { ErrorRequestHandler, RequestHandler } from 'express';
import type { Logger } from 'pino';
import { AppError } from '#shared/errors/app-error.ts';
import { explainParserFault } from './read-json.ts';

const known = (fault: unknown): AppError | null => {
  if (fault instanceof AppError) return fault;
  if (fault instanceof URIError) return new AppError('invalid-request', 'The address is not properly percent-encoded.');
  return explainParserFault(fault);
};

/** No route took the request. */
export const nothingHere: RequestHandler = (request, _response, next) => next(new AppError('not-found', `There is nothing at ${request.path}.`));

/** Every error leaves as RFC 9457 problem details; what was not foreseen is logged and told by number only. */
export const problems = (log: Logger): ErrorRequestHandler => (fault: unknown, request, response, _next) => {
  const id = String(request.id ?? '');
  let error = known(fault);
  if (error === null) {
    log.error({ err: fault, requestId: id, method: request.method, path: request.path }, 'a request failed');
    error = new AppError('internal', `The fault is noted under ${id}. Nothing was half-written.`);
  }
  if (response.headersSent) {
    response.destroy();
    return;
  }
  if (error.code === 'not-signed-in') response.set('www-authenticate', 'Bearer realm="evenbeam"');
  response.removeHeader('content-disposition');
  response.status(error.status).set('cache-control', 'no-store').type('application/problem+json').send(JSON.stringify({ ...error.toProblem(), code: error.code, instance: request.originalUrl.split('?')[0] }));
};
