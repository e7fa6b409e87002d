import { contentIdOf, sha256Hex } from '#shared/formats/canonical-json.ts';
import { versionedAccessionOf } from '#shared/domain/ids.ts';
import { runSql } from '#api/lib/run-sql.ts';
import type { Finding, ScrubCheck } from './finding.ts';

interface Row {
  accession: string;
  version: number;
  kind: string;
  bytes: Buffer;
  sha256: string;
  content_id: string;
  bytes_sha256: string;
  result_sha256: string;
  replicates_sha256: string;
}

const kinds = ['dataset', 'result', 'replicates'] as const;
const columnOf = { dataset: 'bytes_sha256', result: 'result_sha256', replicates: 'replicates_sha256' } as const;
const isKind = (kind: string): kind is (typeof kinds)[number] => kind in columnOf;

const contentOf = (bytes: Uint8Array): string => {
  try {
    return contentIdOf(JSON.parse(new TextDecoder('utf-8', { fatal: true }).decode(bytes)));
  } catch {
    return 'nothing readable';
  }
};

const findingsOf = (row: Row): Finding[] => {
  const where = versionedAccessionOf(row.accession, row.version);
  const found: Finding[] = [];
  const digest = sha256Hex(row.bytes);
  if (digest !== row.sha256) found.push({ where, sentence: `The bytes of its ${row.kind} have the SHA-256 ${digest}; ${row.sha256} was stored beside them.` });
  if (isKind(row.kind) && digest !== row[columnOf[row.kind]]) found.push({ where, sentence: `The bytes of its ${row.kind} have the SHA-256 ${digest}; the version was frozen with ${row[columnOf[row.kind]]}.` });
  if (row.kind === 'dataset' && contentOf(row.bytes) !== row.content_id) found.push({ where, sentence: `Its dataset has the content id ${contentOf(row.bytes)}; the version was frozen with ${row.content_id}.` });
  return found;
};

/** Every stored file of every version, hashed again: bytes, content id, and that none is missing. */
export const checkBytes: ScrubCheck = async ({ em }) => {
  const versions = await runSql<{ accession: string; version: number; sealed: boolean }>(em, 'select accession, version, sealed from entry_version order by accession, version');
  const findings: Finding[] = [];
  let looked = 0;
  for (const { accession, version, sealed } of versions) {
    const rows = await runSql<Row>(em, 'select b.*, v.content_id, v.bytes_sha256, v.result_sha256, v.replicates_sha256 from entry_bytes b join entry_version v using (accession, version) where accession = $1 and version = $2', [accession, version]);
    const where = versionedAccessionOf(accession, version);
    for (const kind of [...kinds, ...(sealed ? ['seal'] : [])]) if (!rows.some((row) => row.kind === kind)) findings.push({ where, sentence: `Its ${kind} is missing.` });
    findings.push(...rows.flatMap(findingsOf));
    looked += rows.length;
  }
  return { looked, findings };
};
