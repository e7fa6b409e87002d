import type { z } from 'zod';
import { problem } from '#shared/contracts/common.ts';
import { me } from '#shared/contracts/session.ts';
import { ApiError, contractError, fromProblem, offlineError, timeoutError } from './api-error.ts';

type Query = Readonly<Record<string, string | number | undefined | null>>;

interface Common {
  query?: Query;
  signal?: AbortSignal;
  /** How long to wait for an answer; ten seconds unless a large body is sent. */
  timeoutMs?: number;
}

export interface SendOptions extends Common {
  /** Sent as JSON. */
  json?: unknown;
  /** Sent as it is, for dataset files; give its content type in `headers`. */
  body?: BodyInit;
  headers?: Readonly<Record<string, string>>;
  /** One key for one act of the reader: a repeated request then has no second effect. */
  idempotencyKey?: string;
}

const defaultTimeoutMs = 10_000;
const secondsInWords = (ms: number): string => (ms === defaultTimeoutMs ? 'ten' : String(Math.round(ms / 1000)));

/** A key for `idempotencyKey`. Make it once for an act and keep it over retries. */
export const newIdempotencyKey = (): string => crypto.randomUUID();

const address = (path: string, query: Query = {}): string => {
  const search = new URLSearchParams();
  for (const [name, value] of Object.entries(query)) if (value !== undefined && value !== null && value !== '') search.set(name, String(value));
  return search.size > 0 ? `${path}?${search}` : path;
};

async function ask(path: string, init: RequestInit, options: Common): Promise<Response> {
  const timeoutMs = options.timeoutMs ?? defaultTimeoutMs;
  const limit = AbortSignal.timeout(timeoutMs);
  const signal = options.signal ? AbortSignal.any([options.signal, limit]) : limit;
  try {
    return await fetch(address(path, options.query), { credentials: 'same-origin', ...init, signal, headers: { accept: 'application/json', ...init.headers } });
  } catch (error) {
    if (options.signal?.aborted) throw error; // the caller gave up; not a fault
    throw limit.aborted ? timeoutError(secondsInWords(timeoutMs)) : offlineError(error);
  }
}

/** The problem of a failed answer, or words of our own where a proxy answered in another form. */
async function failure(response: Response): Promise<ApiError> {
  const parsed = problem.safeParse(await response.json().catch(() => null));
  if (parsed.success) return fromProblem(parsed.data);
  return new ApiError({ fault: 'problem', status: response.status, code: `http-${response.status}`, title: 'The registry could not answer', detail: `The registry answered with status ${response.status} and gave no reason. Nothing of yours is lost.` });
}

async function read<T extends z.ZodType>(response: Response, schema: T, path: string): Promise<z.infer<T>> {
  if (!response.ok) throw await failure(response);
  const body: unknown = await response.json().catch((error: unknown) => {
    if (error instanceof DOMException && error.name === 'TimeoutError') throw timeoutError(secondsInWords(defaultTimeoutMs));
    if (error instanceof DOMException && error.name === 'AbortError') throw error;
    throw contractError(response.status, `${path}: not JSON`, error);
  });
  const parsed = schema.safeParse(body);
  if (parsed.success) return parsed.data;
  const first = parsed.error.issues[0];
  throw contractError(response.status, `${path}: ${first ? `${first.path.join('.') || 'body'}, ${first.message}` : 'unknown'}`, parsed.error);
}

/** Reads one address and checks the answer against its contract. */
export async function apiGet<T extends z.ZodType>(path: string, schema: T, options: Common = {}): Promise<z.infer<T>> {
  return read(await ask(path, { method: 'GET' }, options), schema, path);
}

let csrf: Promise<string> | null = null;

/** The session's token against forged requests: asked for once, or kept from the answer of /api/v1/me. */
export const csrfToken = (): Promise<string> => {
  csrf ??= apiGet('/api/v1/me', me).then((answer) => answer.csrfToken);
  csrf.catch(() => { csrf = null; });
  return csrf;
};
export const keepCsrfToken = (token: string): void => { csrf = Promise.resolve(token); };
export const forgetCsrfToken = (): void => { csrf = null; };

async function change(method: string, path: string, options: SendOptions, retry = true): Promise<Response> {
  const headers: Record<string, string> = { ...options.headers, 'x-csrf-token': await csrfToken() };
  if (options.json !== undefined) headers['content-type'] = 'application/json';
  if (options.idempotencyKey) headers['idempotency-key'] = options.idempotencyKey;
  const body = options.json !== undefined ? JSON.stringify(options.json) : options.body;
  const response = await ask(path, { method, headers, body: body ?? null }, options);
  if (response.ok) return response;
  const error = await failure(response);
  // The token belongs to the session; after a new sign-in in another tab it must be fetched again, once.
  if (retry && response.status === 403 && error.code === 'origin-refused') {
    forgetCsrfToken();
    return change(method, path, options, false);
  }
  throw error;
}

/** Changes something and checks the answer against its contract. */
export async function apiSend<T extends z.ZodType>(method: 'POST' | 'PUT' | 'PATCH' | 'DELETE', path: string, schema: T, options: SendOptions = {}): Promise<z.infer<T>> {
  return read(await change(method, path, options), schema, path);
}

/** Changes something whose answer has no body (204). */
export async function apiDo(method: 'POST' | 'PUT' | 'PATCH' | 'DELETE', path: string, options: SendOptions = {}): Promise<void> {
  await change(method, path, options);
}
