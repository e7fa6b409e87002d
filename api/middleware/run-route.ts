import { Readable } from 'node:stream';
import { pipeline } from 'node:stream/promises';
import type { Request, RequestHandler, Response } from 'express';
import { ruleOf } from '#shared/domain/rules.ts';
import { AppError } from '#shared/errors/app-error.ts';
import { authorise } from '#api/lib/authorise.ts';
import type { RawBody, Route, Scope } from '#api/lib/define-route.ts';
import type { Deps } from '#api/lib/deps.ts';
import { BytesReply, JsonReply } from '#api/lib/reply.ts';
import { validate } from '#api/lib/validate.ts';
import { findCaller } from './find-caller.ts';
import { readJson } from './read-json.ts';
import { refuseForgery } from './refuse-forgery.ts';

const rawBody = (request: Request, types: readonly string[]): RawBody => {
  const contentType = (request.get('content-type') ?? '').split(';')[0]?.trim().toLowerCase() ?? '';
  if (!types.includes(contentType)) throw new AppError('unsupported-media-type', `Content-Type is ${JSON.stringify(contentType)}; this address takes ${types.join(' or ')}.`);
  const contentEncoding = (request.get('content-encoding') ?? '').toLowerCase().replace('identity', '');
  if (contentEncoding !== '' && contentEncoding !== 'gzip') throw new AppError('unsupported-media-type', `Content-Encoding is ${JSON.stringify(contentEncoding)}; this address takes gzip or none.`);
  const length = request.get('content-length');
  return { stream: request, contentType, contentEncoding, contentLength: length === undefined ? null : Number(length) };
};

/** A reader who leaves before the end is no fault of ours, and nothing is left to answer. */
const streamTo = async (body: Readable, response: Response): Promise<void> => {
  try {
    await pipeline(body, response);
  } catch (fault) {
    if ((fault as NodeJS.ErrnoException).code !== 'ERR_STREAM_PREMATURE_CLOSE' || !response.closed) throw fault;
  }
};

const send = async (route: Route, answer: unknown, response: Response): Promise<void> => {
  if (answer instanceof BytesReply) {
    response.status(answer.options.status ?? route.status).set(answer.options.headers ?? {}).type(answer.contentType);
    if (answer.body instanceof Readable) await streamTo(answer.body, response);
    else response.send(typeof answer.body === 'string' ? answer.body : Buffer.from(answer.body));
    return;
  }
  const { body, options } = answer instanceof JsonReply ? answer : { body: answer, options: {} };
  response.status(options.status ?? route.status).set(options.headers ?? {});
  if (!route.response) response.end();
  // The answer goes through its schema: what the contract does not name never leaves the server.
  else response.json(route.response.parse(body));
};

/** sign-in → validate → load → policy → service and presenter (the handler). The rate limit has run before. */
export const runRoute = (route: Route, deps: Deps): RequestHandler => async (request, response) => {
  const em = deps.orm.em.fork();
  const caller = await findCaller(request, em, deps.clock);
  response.set('cache-control', route.action === 'public.read' ? 'public, max-age=0, must-revalidate' : 'no-store');
  // Strangers are turned away before their input is looked at or anything is loaded for them.
  if (!ruleOf(route.action).standings.includes('anyone') && !caller.user && !caller.token) authorise(route.action, caller);
  refuseForgery(request, caller, deps.config.publicUrl);
  const scope: Scope = {
    params: route.params ? validate(route.params, request.params, 'path') : undefined,
    query: route.query ? validate(route.query, request.query, 'query') : undefined,
    body: route.body ? validate(route.body, await readJson(request, response), 'body') : undefined,
    raw: route.raw ? rawBody(request, route.raw.types) : (undefined as unknown as RawBody),
    header: (name) => request.get(name),
    caller,
    em,
    deps,
    requestId: String(request.id),
    endSession: () => new Promise((resolve, reject) => request.session.destroy((fault?: unknown) => (fault ? reject(fault) : resolve()))),
  };
  const loaded = route.load ? await route.load(scope) : undefined;
  authorise(route.action, caller, loaded?.thing);
  await send(route, await route.handler({ ...scope, loaded }), response);
};
