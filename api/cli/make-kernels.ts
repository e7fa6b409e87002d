/**
 * Compiles the AssemblyScript of shared/linalg/wasm/assembly to shared/linalg/wasm/kernel-bytes.ts. Run after a change of
 * either: `npm run kernels`. A test checks that the bytes are those of the sources.
 */
import { writeFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { compileKernels, kernelModule } from '#api/lib/kernel-source.ts';

const root = fileURLToPath(new URL('../../', import.meta.url));
process.chdir(root);
const bytes = await compileKernels();
writeFileSync('shared/linalg/wasm/kernel-bytes.ts', kernelModule(bytes));
console.log(`shared/linalg/wasm/kernel-bytes.ts: ${bytes.length} bytes`);
