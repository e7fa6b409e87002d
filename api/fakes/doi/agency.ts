import { appendFileSync, existsSync, mkdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';

export interface Received {
  at: string;
  method: string;
  doi: string;
  event: string;
  attributes: Record<string, unknown>;
}

/** What the stand-in was told, kept in one file a line each, and read again at its next start. */
export class KeptDois {
  readonly file: string;
  private readonly byDoi = new Map<string, Received>();

  constructor(folder: string) {
    mkdirSync(folder, { recursive: true });
    this.file = join(folder, 'dois.jsonl');
    if (!existsSync(this.file)) return;
    for (const line of readFileSync(this.file, 'utf8').split('\n').filter(Boolean)) {
      const received = JSON.parse(line) as Received;
      this.byDoi.set(received.doi, received);
    }
  }

  get(doi: string): Received | undefined {
    return this.byDoi.get(doi);
  }

  keep(received: Received): void {
    appendFileSync(this.file, `${JSON.stringify(received)}\n`);
    this.byDoi.set(received.doi, received);
  }

  all(): Received[] {
    return [...this.byDoi.values()];
  }
}

const required = ['url', 'creators', 'titles', 'publisher', 'publicationYear', 'types'] as const;
const isBlank = (value: unknown): boolean => value === undefined || value === null || value === '' || (Array.isArray(value) && value.length === 0);

/** What the metadata schema requires before a DOI can be registered, as far as it is missing. */
export const missingFrom = (attributes: Record<string, unknown>): { source: string; title: string }[] => required.filter((name) => isBlank(attributes[name])).map((source) => ({ source, title: "can't be blank" }));
