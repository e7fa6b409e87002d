import { kernelBase64 } from '#shared/linalg/wasm/kernel-bytes.ts';

/** Groups of four that the wide sparse kernel takes at once: eight sums hide the latency of an addition. */
export const WIDE = 4;

/** What the module exports; sources and meaning of the arguments in shared/linalg/wasm/assembly. Addresses are in bytes. */
export interface Kernels {
  panel: (a: number, stride: number, rows: number, k: number, x: number, out: number) => void;
  advance4: (g: number, vectors: number, parent: number, from: number, to: number) => void;
  advance16: (g: number, vectors: number, parent: number, from: number, to: number) => void;
  sparse1: (start: number, index: number, value: number, rows: number, x: number, y: number) => void;
  sparse4: (start: number, index: number, value: number, rows: number, x: number, y: number, xGroup: number, yGroup: number) => void;
  dots: (pairs: number, count: number, out: number, bytes: number) => void;
  uniform: (state: number, out: number, count: number) => void;
  applyOne: (v: number, size: number, stride: number, map: number) => void;
  applyTwo: (v: number, rest: number, count: number, si: number, sj: number, map: number, scratch: number) => void;
  columns: (a: number, n: number, height: number, x: number, out: number) => void;
}

export function kernelBytes(): Uint8Array<ArrayBuffer> {
  return Uint8Array.from(atob(kernelBase64), (c) => c.charCodeAt(0));
}
