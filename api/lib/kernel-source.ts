import { existsSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { main } from 'assemblyscript/asc';

const entry = 'shared/linalg/wasm/assembly/index.ts';
/**
 * Vectors but neither fused multiply-add nor relaxed ones, which would round otherwise than plain TypeScript; no runtime, no
 * memory of its own, and optimised until nothing changes any more.
 */
const options = ['--runtime', 'stub', '--enable', 'simd', '--importMemory', '--noExportMemory', '--noAssert', '--pedantic', '-O3', '--converge'];

/** The module that the AssemblyScript sources of shared/linalg/wasm/assembly make. Run from the root of the project. */
export async function compileKernels(): Promise<Uint8Array> {
  let bytes: Uint8Array | null = null;
  const { error, stderr } = await main([entry, ...options, '--outFile', 'kernels.wasm'], {
    // The compiler puts .ts behind every import; ours name the file whole, like all others of the project.
    readFile: (name, base) => {
      const file = join(base, name.replace(/\.ts\.ts$/, '.ts'));
      return existsSync(file) ? readFileSync(file, 'utf8') : null;
    },
    writeFile: (name, contents) => {
      if (name === 'kernels.wasm' && typeof contents !== 'string') bytes = contents;
    },
  });
  if (error || !bytes) throw new Error(`The kernels were not compiled: ${error?.message ?? ''}\n${stderr.toString()}`);
  return bytes;
}

/** What shared/linalg/wasm/kernel-bytes.ts holds. */
export const kernelModule = (bytes: Uint8Array): string =>
  `/** Written by \`npm run kernels\` from shared/linalg/wasm/assembly; do not edit. */\nexport const kernelBase64 =\n${Buffer.from(bytes).toString('base64').match(/.{1,120}/g)!.map((part) => `  '${part}'`).join(' +\n')};\n`;
