/** Bounds that hold for every file, whatever its format. The bounds of single properties stand in the schemas. */
export const limits = {
  /** Bytes of a file when unpacked: 64 MiB. */
  bytes: 64 * 1024 * 1024,
  /** Arrays and objects inside one another, the outermost counted. The formats themselves need eight; `extra` may use the rest. */
  nesting: 32,
  /** Objects and arrays in one file. The smallest circuit takes three of them in 49 bytes, so no dataset of 64 MiB can reach this. */
  containers: 4 * 1024 * 1024 + 1024,
  /** Faults told at once. */
  errors: 50,
} as const;
