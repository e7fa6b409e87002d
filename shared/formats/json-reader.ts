import { loneSurrogateIn, StringTable } from '#shared/formats/json-strings.ts';
import { limits } from '#shared/formats/limits.ts';
import { pointerOf, shown } from '#shared/formats/pointer.ts';

export type JsonValue = null | boolean | number | string | JsonValue[] | { [key: string]: JsonValue };

/** Stops the reading; what was found before it stands in `faults`. */
export class ReadingStopped extends Error {}

/** Keys that mean something to the language itself; nothing good bears these names. */
const trapKeys = new Set(['__proto__', 'constructor', 'prototype']);
const numberPattern = /-?(?:0|[1-9][0-9]*)(?:\.[0-9]+)?(?:[eE][+-]?[0-9]+)?/y;

const isBlank = (code: number): boolean => code === 0x20 || code === 0x0a || code === 0x0d || code === 0x09;
const isDigit = (code: number): boolean => code >= 0x30 && code <= 0x39;

/**
 * Reads one JSON text (RFC 8259) in a single pass and refuses what JSON.parse would silently mend: keys named twice,
 * numbers that a double cannot hold, half surrogate pairs, trap keys, nesting without end.
 * Faults of single values are gathered in `faults` and the reading goes on; faults of syntax end it.
 * Cost: linear in the text; depth is bounded, so the recursion is.
 */
export class JsonReader {
  readonly faults: { pointer: string; message: string }[] = [];
  private readonly text: string;
  private readonly strings: StringTable;
  private readonly path: (string | number)[] = [];
  private at = 0;
  private containers = 0;

  constructor(text: string) {
    this.text = text;
    this.strings = new StringTable(text);
  }

  read(): JsonValue {
    this.skipBlanks();
    const value = this.value();
    this.skipBlanks();
    if (this.at < this.text.length) this.stop(`The file goes on after its end with ${this.here()}.`);
    return value;
  }

  private place(): string {
    let line = 1;
    let start = 0;
    for (let i = this.text.indexOf('\n'); i !== -1 && i < this.at; i = this.text.indexOf('\n', i + 1)) {
      line++;
      start = i + 1;
    }
    return `line ${line}, column ${this.at - start + 1}`;
  }

  private here(): string {
    return this.at >= this.text.length ? 'the end of the file' : shown(String.fromCodePoint(this.text.codePointAt(this.at) ?? 0));
  }

  private stop(sentence: string): never {
    this.faults.push({ pointer: pointerOf(...this.path), message: `${sentence.replace(/\.$/, '')} (${this.place()}).` });
    throw new ReadingStopped();
  }

  private fault(sentence: string, ...deeper: string[]): void {
    this.faults.push({ pointer: pointerOf(...this.path, ...deeper), message: sentence });
    if (this.faults.length >= limits.errors) throw new ReadingStopped();
  }

  private skipBlanks(): void {
    while (isBlank(this.text.charCodeAt(this.at))) this.at++;
  }

  private value(): JsonValue {
    const code = this.text.charCodeAt(this.at);
    if (code === 0x22) return this.string();
    if (code === 0x2d || isDigit(code)) return this.number();
    if (code === 0x7b) return this.object();
    if (code === 0x5b) return this.array();
    if (code === 0x74) return this.word('true', true);
    if (code === 0x66) return this.word('false', false);
    if (code === 0x6e) return this.word('null', null);
    return this.stop(`A value should stand here, not ${this.here()}.`);
  }

  private word<T extends JsonValue>(word: string, meaning: T): T {
    if (!this.text.startsWith(word, this.at)) this.stop(`A value should stand here, not ${shown(this.text.slice(this.at, this.at + 8))}.`);
    this.at += word.length;
    return meaning;
  }

  private number(): number {
    const start = this.at;
    let i = this.text.charCodeAt(start) === 0x2d ? start + 1 : start;
    const first = this.text.charCodeAt(i);
    let whole = 0;
    while (isDigit(this.text.charCodeAt(i)) && i - start < 16) whole = whole * 10 + this.text.charCodeAt(i++) - 0x30;
    const after = this.text.charCodeAt(i);
    // The common case: a whole number of at most 15 digits.
    if (i > start && first >= 0x31 && first <= 0x39 && i - start < 16 && after !== 0x2e && (after | 0x20) !== 0x65) {
      this.at = i;
      return this.text.charCodeAt(start) === 0x2d ? -whole : whole;
    }
    return this.otherNumber(start);
  }

  private otherNumber(start: number): number {
    numberPattern.lastIndex = start;
    const token = numberPattern.exec(this.text)?.[0];
    const next = this.text.charCodeAt(start + (token?.length ?? 0));
    if (token === undefined || isDigit(next)) this.stop('This is not a number as JSON writes one.');
    this.at = start + token.length;
    const value = Number(token);
    const isWhole = !/[.eE]/.test(token);
    if (!Number.isFinite(value)) this.fault(`The number ${shown(token)} is larger than a double-precision number can be.`);
    else if (isWhole && !Number.isSafeInteger(value)) this.fault(`The whole number ${shown(token)} is beyond 2^53 − 1 and would be rounded.`);
    else if (value === 0 && /[1-9]/.test(token.replace(/[eE].*$/, ''))) this.fault(`The number ${shown(token)} is too small for a double-precision number and would become 0.`);
    // Minus zero and zero are one value with one canonical form.
    return value === 0 ? 0 : value;
  }

  private string(): string {
    const { text } = this;
    const start = this.at + 1;
    let hash = 0;
    for (let i = start; ; i++) {
      const code = text.charCodeAt(i);
      if (code === 0x22) {
        this.at = i + 1;
        return this.strings.plain(start, i, hash ^ (hash >>> 15));
      }
      if (code === 0x5c) return this.escapedString(start, i);
      if (!(code >= 0x20)) this.badCharacter(i);
      hash = (Math.imul(hash, 31) + code) | 0;
    }
  }

  private escapedString(start: number, firstEscape: number): string {
    let i = firstEscape;
    for (let code = 0x5c; code !== 0x22; code = this.text.charCodeAt(i)) {
      if (!(code >= 0x20)) this.badCharacter(i);
      i += code === 0x5c ? 2 : 1;
    }
    let value: string;
    try {
      value = JSON.parse(this.text.slice(start - 1, i + 1)) as string;
    } catch {
      return this.stop('This string holds an escape that JSON does not have.');
    }
    this.at = i + 1;
    if (loneSurrogateIn(value) !== -1) this.fault(`The string ${shown(value)} holds half of a surrogate pair.`);
    return value;
  }

  private badCharacter(index: number): never {
    this.at = index;
    if (index >= this.text.length) this.stop('The file ends inside a string.');
    return this.stop(`The control character ${this.here()} cannot stand in a string; write it as an escape.`);
  }

  private enter(): void {
    if (this.path.length >= limits.nesting) this.stop(`Arrays and objects are nested deeper than ${limits.nesting}.`);
    if (++this.containers > limits.containers) this.stop(`The file holds more than ${limits.containers} arrays and objects.`);
    this.at++;
    this.skipBlanks();
  }

  /** Steps over a comma (true) or the closing bracket (false). */
  private goesOn(close: number): boolean {
    this.skipBlanks();
    const code = this.text.charCodeAt(this.at);
    if (code !== 0x2c && code !== close) this.stop(`A comma or ${close === 0x5d ? '"]"' : '"}"'} should stand here, not ${this.here()}.`);
    this.at++;
    if (code === close) return false;
    this.skipBlanks();
    return true;
  }

  private array(): JsonValue[] {
    this.enter();
    const items: JsonValue[] = [];
    if (this.text.charCodeAt(this.at) === 0x5d) {
      this.at++;
      return items;
    }
    const level = this.path.length;
    do {
      this.path[level] = items.length;
      items.push(this.value());
    } while (this.goesOn(0x5d));
    this.path.length = level;
    return items;
  }

  private object(): { [key: string]: JsonValue } {
    this.enter();
    const members: { [key: string]: JsonValue } = {};
    if (this.text.charCodeAt(this.at) === 0x7d) {
      this.at++;
      return members;
    }
    const level = this.path.length;
    do {
      this.path.length = level;
      const key = this.key(members);
      this.path[level] = key;
      const value = this.value();
      if (!trapKeys.has(key)) members[key] = value;
    } while (this.goesOn(0x7d));
    this.path.length = level;
    return members;
  }

  private key(members: object): string {
    if (this.text.charCodeAt(this.at) !== 0x22) this.stop(`A property name in double quotes should stand here, not ${this.here()}.`);
    const key = this.string();
    if (trapKeys.has(key)) this.fault(`A property may not be called ${shown(key)}.`, key);
    else if (Object.hasOwn(members, key)) this.fault(`The property ${shown(key)} stands here twice.`, key);
    this.skipBlanks();
    if (this.text.charCodeAt(this.at) !== 0x3a) this.stop(`A colon should stand here, not ${this.here()}.`);
    this.at++;
    this.skipBlanks();
    return key;
  }
}
