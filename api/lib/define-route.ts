import type { EntityManager } from '@mikro-orm/postgresql';
import type { Readable } from 'node:stream';
import type { z } from 'zod';
import type { Action, Thing } from '#shared/domain/rules.ts';
import type { Caller } from './caller.ts';
import type { Deps } from './deps.ts';
import type { BytesReply, JsonReply } from './reply.ts';

type Maybe = z.ZodType | undefined;
type Out<S> = S extends z.ZodType ? z.output<S> : undefined;
type In<S> = S extends z.ZodType ? z.input<S> : void;

/** A body taken as it comes, for files: the handler reads the stream and bounds it. */
export interface RawBody {
  stream: Readable;
  contentType: string;
  /** "gzip" or "" */
  contentEncoding: string;
  contentLength: number | null;
}

export interface Scope<P = unknown, Q = unknown, B = unknown> {
  params: P;
  query: Q;
  body: B;
  /** Set only where the route asks for a raw body. */
  raw: RawBody;
  header: (name: string) => string | undefined;
  caller: Caller;
  /** A fork of its own for this request. */
  em: EntityManager;
  deps: Deps;
  requestId: string;
  /** Ends the caller's own session; for signing out. */
  endSession: () => Promise<void>;
}

/** What `load` finds: the thing the rule is judged on, and whatever the handler needs with it. */
export interface Loaded {
  thing: Thing;
}

/** Which allowance a request counts against; see middleware/rate-limits.ts. */
export type Limit = 'read' | 'write' | 'upload';
export type Method = 'get' | 'post' | 'put' | 'patch' | 'delete';

export interface RouteSpec<P extends Maybe, Q extends Maybe, B extends Maybe, R extends Maybe, L extends Loaded | undefined> {
  method: Method;
  /** With Express's placeholders: "/api/v1/entries/:accession". */
  path: string;
  action: Action;
  /** One sentence for the API reference. */
  summary: string;
  params?: P;
  query?: Q;
  body?: B;
  /** Media types of a body that is taken as a stream instead of parsed. */
  raw?: { types: readonly string[] };
  /** Schema of the JSON answer; absent = no content, or bytes. */
  response?: R;
  /** Media types of an answer in bytes. */
  produces?: readonly string[];
  status?: number;
  limit?: Limit;
  /** Finds the thing asked for, or throws not-found. */
  load?: (scope: Scope<Out<P>, Out<Q>, Out<B>>) => Promise<L>;
  handler: (scope: Scope<Out<P>, Out<Q>, Out<B>> & { loaded: L }) => Promise<In<R> | JsonReply<In<R>> | BytesReply>;
}

/** A route with its types taken off, as the list of all routes holds it. */
export interface Route {
  method: Method;
  path: string;
  action: Action;
  summary: string;
  params?: z.ZodType;
  query?: z.ZodType;
  body?: z.ZodType;
  raw?: { types: readonly string[] };
  response?: z.ZodType;
  produces?: readonly string[];
  status: number;
  limit: Limit;
  load?: (scope: Scope) => Promise<Loaded>;
  handler: (scope: Scope & { loaded: Loaded | undefined }) => Promise<unknown>;
}

const usualLimit = (method: Method): Limit => (method === 'get' ? 'read' : 'write');

/**
 * Describes one endpoint. Every route of the API is one of these, listed in api/routes.ts: the server, the
 * generated access test and the API reference all read the same list.
 */
export const defineRoute = <P extends Maybe = undefined, Q extends Maybe = undefined, B extends Maybe = undefined, R extends Maybe = undefined, L extends Loaded | undefined = undefined>(
  spec: RouteSpec<P, Q, B, R, L>,
): Route =>
  ({ limit: spec.raw ? 'upload' : usualLimit(spec.method), status: spec.response || spec.produces ? 200 : 204, ...spec }) as unknown as Route;
