const tableSize = 8192;

/**
 * Strings of a JSON text, made once for each different short string. A dataset repeats a few gate labels and keys
 * millions of times; a table by hash saves the copies.
 */
export class StringTable {
  private readonly table: string[] = new Array<string>(tableSize).fill('');
  private readonly text: string;

  constructor(text: string) {
    this.text = text;
  }

  /** The characters from `start` to `end`, which hold no escape. */
  plain(start: number, end: number, hash: number): string {
    const length = end - start;
    // JSON.parse makes a copy; a slice would keep the whole file in memory for as long as one title lives.
    if (length > 24) return JSON.parse(this.text.slice(start - 1, end + 1)) as string;
    const slot = hash & (tableSize - 1);
    const known = this.table[slot] ?? '';
    if (known.length === length && this.text.startsWith(known, start)) return known;
    const made = length < 13 ? this.text.slice(start, end) : (JSON.parse(this.text.slice(start - 1, end + 1)) as string);
    this.table[slot] = made;
    return made;
  }
}

/** Index of the first half surrogate pair that stands alone, or -1. Such a string has no UTF-8 and no canonical form. */
export function loneSurrogateIn(text: string): number {
  for (let i = 0; i < text.length; i++) {
    const code = text.charCodeAt(i);
    if (code < 0xd800 || code > 0xdfff) continue;
    const next = text.charCodeAt(i + 1);
    if (code > 0xdbff || !(next >= 0xdc00 && next <= 0xdfff)) return i;
    i++;
  }
  return -1;
}
