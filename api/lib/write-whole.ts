import { renameSync, rmSync, writeFileSync } from 'node:fs';

/** Writes a file so that it is there whole or not at all: beside its place first, then moved into it. */
export function writeWhole(file: string, text: string): void {
  const draft = `${file}.${process.pid}.part`;
  try {
    writeFileSync(draft, text);
    renameSync(draft, file);
  } catch (error) {
    rmSync(draft, { force: true });
    throw error;
  }
}
