import type { EntityManager } from '@mikro-orm/postgresql';
import { apiUrl, nameOf, type CitationRecord } from '#shared/citation/record.ts';
import { figureName, intervalAt } from '#shared/domain/figure-words.ts';
import type { Figure } from '#shared/formats/types.ts';
import type { Landing, LandingFigure, LandingFile } from '#shared/landing/landing.ts';
import { runSql } from '#api/lib/run-sql.ts';
import { readCited, type Cited } from '#api/modules/citations/record.ts';

const kinds = {
  dataset: { mediaType: 'application/json', extension: 'dataset.json', description: 'The dataset exactly as it was submitted.' },
  result: { mediaType: 'application/json', extension: 'result.json', description: 'Every figure with its intervals, as frozen.' },
  replicates: { mediaType: 'application/octet-stream', extension: 'replicates.f64', description: 'Bootstrap replicates of every figure, float64 little-endian.' },
  seal: { mediaType: 'application/json', extension: 'seal.json', description: 'The revealed secret that chose the sealed circuits.' },
  'run-sheet': { mediaType: 'application/json', extension: 'run-sheet.json', description: 'The circuits as they were drawn.' },
} as const;
type Kind = keyof typeof kinds;

interface StoredSize {
  kind: Kind;
  sha256: string;
  size: number;
}

const filesOf = async (em: EntityManager, { record, shown }: Cited): Promise<LandingFile[]> => {
  if (record.state === 'withdrawn') return [];
  const stored = await runSql<StoredSize>(
    em,
    `select kind, sha256, length(bytes) as size from entry_bytes where accession = $1 and version = $2
     union all select 'run-sheet', sha256, length(bytes) from run_sheet_file where run_sheet_id = $3`,
    [record.accession, record.version, shown.row.runSheetId ?? ''],
  );
  const byKind = new Map(stored.map((row) => [row.kind, row]));
  const order: Kind[] = ['dataset', 'run-sheet', 'seal', 'result', 'replicates'];
  const files = order.flatMap((kind): LandingFile[] => {
    const row = byKind.get(kind);
    const { mediaType, extension, description } = kinds[kind];
    return row ? [{ name: `${nameOf(record)}.${extension}`, description, url: `${apiUrl(record)}/${kind}`, mediaType, size: row.size, sha256: row.sha256 }] : [];
  });
  return [...files, { name: `${nameOf(record)}.zip`, description: 'All of these files with their digests, always the same bytes.', url: `${apiUrl(record)}/archive`, mediaType: 'application/zip', size: null, sha256: null }];
};

/** Determined figures by name; where the register has several, the qubits stand with it. */
const figuresOf = (figures: readonly Figure[], register: CitationRecord['register'], words: ReadonlyMap<string, string>): LandingFigure[] =>
  figures.flatMap((figure) => {
    if (figure.value === null) return [];
    const range = intervalAt(figure, 0.95);
    const on = register.length > 1 ? ` on ${figure.qubits.map((q) => register[q] ?? String(q)).join(', ')}` : '';
    return [{ name: `${figureName(figure, figure.gate === null ? undefined : words.get(figure.gate))}${on}`, value: figure.value, low: range?.low ?? null, high: range?.high ?? null }];
  });

/** What the page of a version tells machines: of the latest where none is named. */
export const readLanding = async (em: EntityManager, accession: string, version: number | null, registry: string): Promise<Landing> => {
  const cited = await readCited(em, accession, version, registry);
  const { row } = cited.shown;
  return { record: cited.record, files: await filesOf(em, cited), figures: figuresOf(row.summary.figures, row.register, new Map(row.dataset.gates.map((g) => [g.label, g.words]))) };
};
