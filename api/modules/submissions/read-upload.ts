import { createHash } from 'node:crypto';
import { AppError } from '#shared/errors/app-error.ts';
import { limits } from '#shared/formats/limits.ts';
import type { RawBody } from '#api/lib/define-route.ts';
import { gunzipBounded } from '#api/lib/gunzip-bounded.ts';

export interface Upload {
  /** After Content-Encoding is removed. */
  bytes: Uint8Array;
  sha256: string;
}

/** Gathers a stream and hashes what passes; stops as soon as it grows beyond the bound. */
const gather = async (source: AsyncIterable<Uint8Array>): Promise<Uint8Array> => {
  const parts: Uint8Array[] = [];
  let size = 0;
  for await (const part of source) {
    size += part.length;
    if (size > limits.bytes) throw new AppError('too-large', `The file is larger than ${limits.bytes / 1024 / 1024} MiB; that is the most allowed.`);
    parts.push(part);
  }
  return Buffer.concat(parts);
};

const pieceBytes = 4 << 20;

/** SHA-256 in pieces, so that other requests get a turn in between. */
const sha256Of = async (bytes: Uint8Array): Promise<string> => {
  const hash = createHash('sha256');
  for (let from = 0; from < bytes.length; from += pieceBytes) {
    hash.update(bytes.subarray(from, from + pieceBytes));
    await new Promise((resolve) => setImmediate(resolve));
  }
  return hash.digest('hex');
};

/** Reads the body of an upload within its bounds, unpacked. */
export const readUpload = async (raw: RawBody): Promise<Upload> => {
  if (raw.contentLength !== null && raw.contentLength > limits.bytes + (1 << 20)) throw new AppError('too-large', `The body has ${raw.contentLength} bytes; ${limits.bytes} (64 MiB) is the most allowed.`);
  const bytes = raw.contentEncoding === 'gzip' ? await gunzipBounded(raw.stream) : await gather(raw.stream);
  return { bytes, sha256: await sha256Of(bytes) };
};

const decoded = (text: string): string => {
  try {
    return decodeURIComponent(text);
  } catch {
    return text;
  }
};

/** The last part of a path, without control characters; ".gz" goes with the encoding that was removed. */
const cleaned = (name: string, unpacked: boolean): string => {
  const base = (name.split(/[\\/]/).at(-1) ?? '').replace(/\p{Cc}/gu, '').trim();
  const short = unpacked ? base.replace(/\.gz$/i, '') : base;
  return (short === '' ? 'dataset.json' : short).slice(0, 200);
};

/** The file's name as the sender tells it: query, X-File-Name (percent-encoded), or Content-Disposition (RFC 6266). */
export const fileNameOf = (given: { query?: string | undefined; header: (name: string) => string | undefined; unpacked: boolean }): string => {
  const disposition = given.header('content-disposition') ?? '';
  const extended = /filename\*=UTF-8''([^;\s]+)/i.exec(disposition)?.[1];
  const plain = /filename="([^"]*)"/i.exec(disposition)?.[1];
  const named = given.query ?? (given.header('x-file-name') === undefined ? undefined : decoded(given.header('x-file-name') ?? '')) ?? (extended === undefined ? plain : decoded(extended));
  return cleaned(named ?? 'dataset.json', given.unpacked);
};
