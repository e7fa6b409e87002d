/**
 * Just enough of the WebAssembly binary format (core specification 2.0, with the vector instructions) to write the three
 * kernels by hand: a module that imports one memory and exports functions of 32-bit integers without results.
 */

export const I32 = 0x7f;
export const I64 = 0x7e;
export const V128 = 0x7b;

/** Code is a list of bytes, built by nesting. */
export type Code = number[];

export function unsigned(value: number): Code {
  const out: Code = [];
  let left = value;
  do {
    const byte = left & 0x7f;
    left >>>= 7;
    out.push(left === 0 ? byte : byte | 0x80);
  } while (left !== 0);
  return out;
}

function signed(value: number): Code {
  const out: Code = [];
  let left = value;
  for (;;) {
    const byte = left & 0x7f;
    left >>= 7;
    if ((left === 0 && (byte & 0x40) === 0) || (left === -1 && (byte & 0x40) !== 0)) return [...out, byte];
    out.push(byte | 0x80);
  }
}

export const get = (local: number): Code => [0x20, ...unsigned(local)];
export const set = (local: number, value: Code): Code => [...value, 0x21, ...unsigned(local)];
export const constant = (value: number): Code => [0x41, ...signed(value)];
export const plus = (a: Code, b: Code): Code => [...a, ...b, 0x6a];
export const times = (a: Code, b: Code): Code => [...a, ...b, 0x6c];
export const below = (a: Code, b: Code): Code => [...a, ...b, 0x48];
/** local += value. */
export const advance = (local: number, value: Code): Code => set(local, plus(get(local), value));
/** Repeats the body as long as the condition, looked at before each turn, holds. */
export const whileTrue = (condition: Code, body: Code): Code => [0x02, 0x40, 0x03, 0x40, ...condition, 0x45, 0x0d, 0x01, ...body, 0x0c, 0x00, 0x0b, 0x0b];

const vector = (opcode: number): Code => [0xfd, ...unsigned(opcode)];
/** Two doubles at address + offset. */
export const load = (address: Code, offset = 0): Code => [...address, ...vector(0x00), 3, ...unsigned(offset)];
/** One double, twice. */
export const splat = (address: Code, offset = 0): Code => [...address, ...vector(0x0a), 3, ...unsigned(offset)];
export const store = (address: Code, value: Code, offset = 0): Code => [...address, ...value, ...vector(0x0b), 3, ...unsigned(offset)];
export const add2 = (a: Code, b: Code): Code => [...a, ...b, ...vector(0xf0)];
export const subtract2 = (a: Code, b: Code): Code => [...a, ...b, ...vector(0xf1)];
export const multiply2 = (a: Code, b: Code): Code => [...a, ...b, ...vector(0xf2)];
/** Sum of the two doubles of a vector local. */
export const sum2 = (local: number): Code => [...get(local), ...vector(0x21), 0, ...get(local), ...vector(0x21), 1, 0xa0];
export const addDoubles = (a: Code, b: Code): Code => [...a, ...b, 0xa0];
export const storeDouble = (address: Code, value: Code): Code => [...address, ...value, 0x39, 3, 0];
/** 32-bit integer at address + offset. */
export const integer = (address: Code, offset = 0): Code => [...address, 0x28, 2, ...unsigned(offset)];

/** Operations on 64-bit integers. */
export const long = {
  constant: (value: number): Code => [0x42, ...signed(value)],
  load: (address: Code, offset: number): Code => [...address, 0x29, 3, ...unsigned(offset)],
  store: (address: Code, value: Code, offset: number): Code => [...address, ...value, 0x37, 3, ...unsigned(offset)],
  times: (a: Code, b: Code): Code => [...a, ...b, 0x7e],
  xor: (a: Code, b: Code): Code => [...a, ...b, 0x85],
  left: (a: Code, by: number): Code => [...a, 0x42, ...signed(by), 0x86],
  right: (a: Code, by: number): Code => [...a, 0x42, ...signed(by), 0x88],
  rotate: (a: Code, by: number): Code => [...a, 0x42, ...signed(by), 0x89],
  /** As a double, times 2⁻⁵³. */
  share: (a: Code): Code => [...a, 0xba, 0x44, 0, 0, 0, 0, 0, 0, 0xa0, 0x3c, 0xa2],
};

export interface Kernel {
  name: string;
  /** How many 32-bit parameters it takes; they are locals 0, 1, … */
  parameters: number;
  /** Further locals, in order: integers, 64-bit integers, vectors. */
  integers: number;
  longs?: number;
  vectors: number;
  body: Code;
}

function section(id: number, content: Code): Code {
  return [id, ...unsigned(content.length), ...content];
}

const text = (s: string): Code => [...unsigned(s.length), ...Array.from(s, (c) => c.charCodeAt(0))];

/** The bytes of a module with these kernels; its memory is imported as m.m. */
export function encodeModule(kernels: readonly Kernel[]): Uint8Array {
  const list = (items: Code[]): Code => [...unsigned(items.length), ...items.flat()];
  const types = list(kernels.map((k) => [0x60, ...unsigned(k.parameters), ...new Array<number>(k.parameters).fill(I32), 0]));
  const functions = list(kernels.map((_, i) => unsigned(i)));
  const exported = list(kernels.map((k, i) => [...text(k.name), 0x00, ...unsigned(i)]));
  const bodies = list(kernels.map((k) => {
    const code = [...list([[...unsigned(k.integers), I32], [...unsigned(k.longs ?? 0), I64], [...unsigned(k.vectors), V128]]), ...k.body, 0x0b];
    return [...unsigned(code.length), ...code];
  }));
  return Uint8Array.from([
    0x00, 0x61, 0x73, 0x6d, 0x01, 0x00, 0x00, 0x00,
    ...section(1, types), ...section(2, list([[...text('m'), ...text('m'), 0x02, 0x00, 0x00]])), ...section(3, functions), ...section(7, exported), ...section(10, bodies),
  ]);
}
