import { kernelBytes, type Kernels } from '#shared/linalg/wasm/kernels.ts';

/** One stretch of memory, with the kernels that work on it; null where WebAssembly vectors are not to be had and plain TypeScript does the same. */
export interface Arena {
  buffer: ArrayBuffer;
  kernels: Kernels | null;
}

const PAGE = 65536;

/** undefined = not tried yet; null = refused (an old engine, or a page whose policy forbids it). */
let compiled: WebAssembly.Module | null | undefined;

function compile(): WebAssembly.Module | null {
  if (compiled !== undefined) return compiled;
  try {
    compiled = new WebAssembly.Module(kernelBytes());
  } catch {
    compiled = null;
  }
  return compiled;
}

/** Fresh zeroed memory of at least `bytes`. With `plain` the kernels are left out: for the test that both give the same bits. */
export function openArena(bytes: number, plain = false): Arena {
  const module = plain ? null : compile();
  if (!module) return { buffer: new ArrayBuffer(bytes), kernels: null };
  const pages = Math.max(1, Math.ceil(bytes / PAGE));
  const memory = new WebAssembly.Memory({ initial: pages, maximum: pages });
  const instance = new WebAssembly.Instance(module, { env: { memory } });
  return { buffer: memory.buffer, kernels: instance.exports as unknown as Kernels };
}
