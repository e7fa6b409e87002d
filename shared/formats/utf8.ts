import { limits } from '#shared/formats/limits.ts';

/** A text that cannot be read, with the place in words where it has one. */
export class UnreadableText extends Error {}

/** Length of the well-formed sequence (RFC 3629, table of section 4) that starts at `i`; 0 where there is none. */
function sequenceAt(bytes: Uint8Array, i: number): number {
  const lead = bytes[i] ?? 0;
  if (lead < 0x80) return 1;
  const length = lead >= 0xc2 && lead <= 0xdf ? 2 : lead >= 0xe0 && lead <= 0xef ? 3 : lead >= 0xf0 && lead <= 0xf4 ? 4 : 0;
  for (let k = 1; k < length; k++) {
    const byte = bytes[i + k] ?? 0;
    // Longer forms than needed, surrogates and code points beyond U+10FFFF are barred by the second byte.
    const low = k === 1 && lead === 0xe0 ? 0xa0 : k === 1 && lead === 0xf0 ? 0x90 : 0x80;
    const high = k === 1 && lead === 0xed ? 0x9f : k === 1 && lead === 0xf4 ? 0x8f : 0xbf;
    if (byte < low || byte > high) return 0;
  }
  return length;
}

/** Offset of the first byte that starts no well-formed sequence; the length where all do. */
export function firstBadByte(bytes: Uint8Array): number {
  let i = 0;
  for (let step = 1; i < bytes.length && step > 0; i += step) step = sequenceAt(bytes, i);
  return i;
}

/**
 * UTF-8 bytes as text; anything that is not strict UTF-8 without a byte-order mark within the size limit is refused.
 * Cost: one pass; for a file that is refused, a second pass to find the place.
 */
export function decodeUtf8(bytes: Uint8Array): string {
  if (bytes.length > limits.bytes) throw new UnreadableText(`The file has ${bytes.length} bytes; at most ${limits.bytes} (64 MiB) are allowed.`);
  if (bytes[0] === 0x1f && bytes[1] === 0x8b) throw new UnreadableText('The file is compressed (gzip) and must be unpacked first.');
  if (bytes[0] === 0xef && bytes[1] === 0xbb && bytes[2] === 0xbf) throw new UnreadableText('The file starts with a byte-order mark (EF BB BF); leave it out.');
  try {
    return new TextDecoder('utf-8', { fatal: true, ignoreBOM: true }).decode(bytes);
  } catch {
    const offset = firstBadByte(bytes);
    const byte = (bytes[offset] ?? 0).toString(16).toUpperCase().padStart(2, '0');
    throw new UnreadableText(`The file is not UTF-8: byte ${offset + 1} (${byte}) cannot stand there.`);
  }
}
