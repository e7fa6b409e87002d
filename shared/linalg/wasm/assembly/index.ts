// AssemblyScript: what the module exports. Its memory is imported; it allocates nothing.
export { advance16, advance4 } from './advance.ts';
export { columns } from './columns.ts';
export { dots } from './dots.ts';
export { panel } from './panel.ts';
export { sparse1, sparse4 } from './sparse.ts';
export { applyOne, applyTwo } from './two-qubits.ts';
export { uniform } from './uniform.ts';
