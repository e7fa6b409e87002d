import type { Readable } from 'node:stream';

export interface ReplyOptions {
  status?: number;
  headers?: Record<string, string>;
}

/** A JSON answer with a status or headers of its own. A handler that needs neither returns the value itself. */
export class JsonReply<T> {
  constructor(
    readonly body: T,
    readonly options: ReplyOptions,
  ) {}
}

/** An answer that is not JSON made here: stored bytes, a text, a stream. */
export class BytesReply {
  constructor(
    readonly body: Buffer | Uint8Array | string | Readable,
    readonly contentType: string,
    readonly options: ReplyOptions,
  ) {}
}

export const reply = <T>(body: T, options: ReplyOptions = {}): JsonReply<T> => new JsonReply(body, options);
export const bytes = (body: BytesReply['body'], contentType: string, options: ReplyOptions = {}): BytesReply => new BytesReply(body, contentType, options);
