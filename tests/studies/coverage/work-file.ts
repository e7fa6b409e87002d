import { appendFileSync, existsSync, mkdirSync, readFileSync } from 'node:fs';
import { dirname } from 'node:path';
import type { ChunkResult } from '#tests/studies/coverage/chunk.ts';

/** Results of finished chunks, one JSON line each, so that a study can stop at any moment and go on later. */
export class WorkFile {
  private readonly path: string;
  private readonly found = new Map<string, ChunkResult>();

  constructor(path: string) {
    this.path = path;
    mkdirSync(dirname(path), { recursive: true });
    if (!existsSync(path)) return;
    const text = readFileSync(path, 'utf8');
    for (const line of text.split('\n')) {
      const result = parse(line);
      if (result) this.found.set(key(result.cell, result.chunk), result);
    }
    // A line that was cut off must not swallow the next one.
    if (text !== '' && !text.endsWith('\n')) appendFileSync(path, '\n');
  }

  has(cell: string, chunk: number): boolean {
    return this.found.has(key(cell, chunk));
  }

  /** A chunk that is there already is not counted twice. */
  add(result: ChunkResult): void {
    if (this.has(result.cell, result.chunk)) return;
    this.found.set(key(result.cell, result.chunk), result);
    appendFileSync(this.path, `${JSON.stringify(result)}\n`);
  }

  get results(): ChunkResult[] {
    return [...this.found.values()];
  }
}

const key = (cell: string, chunk: number): string => `${cell}, chunk ${chunk}`;

/** Null for an empty line and for one that was cut off. */
function parse(line: string): ChunkResult | null {
  try {
    return line === '' ? null : (JSON.parse(line) as ChunkResult);
  } catch {
    return null;
  }
}
