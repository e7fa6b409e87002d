import canonicalize from 'canonicalize';
import { sha256 } from '@noble/hashes/sha2.js';
import { bytesToHex, utf8ToBytes } from '@noble/hashes/utils.js';

/** Printable ASCII without quote and backslash: written as it is, between quotes. */
const plain = /^[ !#-[\]-~]*$/;

/** Characters gathered before they are hashed: large enough to be fast, small beside the file. */
const chunkSize = 1 << 16;

/**
 * Writes the canonical form piece by piece. Only what repeats millions of times in a dataset is written here, and every
 * other value by the library; a property test holds the two equal.
 */
class CanonicalWriter {
  private text = '';
  private readonly quoted = new Map<string, string>();
  private readonly emit: (chunk: string) => void;

  constructor(emit: (chunk: string) => void) {
    this.emit = emit;
  }

  write(value: unknown): void {
    if (typeof value === 'string') this.text += this.quote(value);
    else if (typeof value === 'number' && Number.isInteger(value)) this.text += String(value);
    else if (Array.isArray(value)) this.writeArray(value);
    else if (typeof value === 'object' && value !== null && !('toJSON' in value)) this.writeObject(value as Record<string, unknown>);
    else this.text += canonicalJsonByLibrary(value);
    if (this.text.length >= chunkSize) this.flush();
  }

  flush(): void {
    this.emit(this.text);
    this.text = '';
  }

  private writeArray(items: readonly unknown[]): void {
    for (let i = 0; i < items.length; i++) {
      this.text += i === 0 ? '[' : ',';
      this.write(items[i] === undefined ? null : items[i]);
    }
    this.text += items.length === 0 ? '[]' : ']';
  }

  private writeObject(members: Record<string, unknown>): void {
    let open = true;
    for (const key of Object.keys(members).sort()) {
      if (members[key] === undefined) continue;
      this.text += `${open ? '{' : ','}${this.quote(key)}:`;
      open = false;
      this.write(members[key]);
    }
    this.text += open ? '{}' : '}';
  }

  private quote(text: string): string {
    if (text.length > 24) return canonicalJsonByLibrary(text);
    const known = this.quoted.get(text);
    if (known !== undefined) return known;
    const made = plain.test(text) ? `"${text}"` : canonicalJsonByLibrary(text);
    if (this.quoted.size < 4096) this.quoted.set(text, made);
    return made;
  }
}

/** The canonical form as the library writes it: what the quick writer is held to. */
export function canonicalJsonByLibrary(value: unknown): string {
  const text = canonicalize(value);
  if (text === undefined) throw new TypeError('The value has no JSON form.');
  return text;
}

/**
 * The canonical form of RFC 8785: no blanks, keys in order of their UTF-16 code units, numbers as ECMAScript
 * writes them. Throws on what has no JSON form (NaN, infinity, half surrogate pairs).
 */
export function canonicalJson(value: unknown): string {
  let text = '';
  const writer = new CanonicalWriter((chunk) => (text += chunk));
  writer.write(value);
  writer.flush();
  return text;
}

/** SHA-256 in lower-case hex. */
export function sha256Hex(bytes: Uint8Array): string {
  return bytesToHex(sha256(bytes));
}

/**
 * The content id of a JSON value: SHA-256 of the UTF-8 bytes of its canonical form, lower-case hex.
 * Cost: linear; the canonical form is hashed piece by piece and never held whole.
 */
export function contentIdOf(value: unknown): string {
  const hash = sha256.create();
  // A piece ends between two tokens, so never inside a surrogate pair.
  const writer = new CanonicalWriter((chunk) => void hash.update(utf8ToBytes(chunk)));
  writer.write(value);
  writer.flush();
  return bytesToHex(hash.digest());
}
