import type { ErrorDetail } from '#shared/errors/app-error.ts';
import { JsonReader, ReadingStopped, type JsonValue } from '#shared/formats/json-reader.ts';
import { decodeUtf8, UnreadableText } from '#shared/formats/utf8.ts';

export type Decoded = { ok: true; value: JsonValue } | { ok: false; errors: ErrorDetail[] };

/**
 * Bytes to a JSON value, strictly: UTF-8 without a byte-order mark, at most 64 MiB, nesting at most 32, no key twice,
 * no number that a double cannot hold. Every fault names its place: a JSON Pointer, and line and column where the
 * syntax breaks. What it returns has one canonical form and survives JSON.stringify unchanged.
 */
export function decodeJson(bytes: Uint8Array): Decoded {
  let text: string;
  try {
    text = decodeUtf8(bytes);
  } catch (error) {
    if (!(error instanceof UnreadableText)) throw error;
    return { ok: false, errors: [{ pointer: '', message: error.message }] };
  }
  const reader = new JsonReader(text);
  try {
    const value = reader.read();
    return reader.faults.length === 0 ? { ok: true, value } : { ok: false, errors: reader.faults };
  } catch (error) {
    if (!(error instanceof ReadingStopped)) throw error;
    return { ok: false, errors: reader.faults };
  }
}
