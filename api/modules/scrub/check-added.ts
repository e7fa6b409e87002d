import { isDeepStrictEqual } from 'node:util';
import { sha256Hex } from '#shared/formats/canonical-json.ts';
import type { Result } from '#shared/formats/types.ts';
import { runSql } from '#api/lib/run-sql.ts';
import type { ResultSummary } from '#api/modules/submissions/result-summary.ts';
import type { Finding, ScrubCheck } from './finding.ts';

interface AddedRow {
  accession: string;
  version: number;
  method: string;
  content_id: string;
  replicate_count: number;
  result: Buffer;
  result_sha256: string;
  replicates_found: string;
  replicates_sha256: string;
  summary: ResultSummary;
}

const addedFindings = (row: AddedRow): Finding[] => {
  const where = `${row.accession}.${row.version} by ${row.method}`;
  const told = (ok: boolean, sentence: string): Finding[] => (ok ? [] : [{ where, sentence }]);
  const digest = sha256Hex(row.result);
  const faults = [
    ...told(digest === row.result_sha256, `Its result has the SHA-256 ${digest}; ${row.result_sha256} was stored beside it.`),
    ...told(row.replicates_found === row.replicates_sha256, `Its replicates have the SHA-256 ${row.replicates_found}; ${row.replicates_sha256} was stored beside them.`),
  ];
  if (faults.length > 0) return faults;
  const result = JSON.parse(row.result.toString('utf8')) as Result;
  return [
    ...told(result.method === row.method, `Its result names the method version ${result.method}.`),
    ...told(result.datasetSha256 === row.content_id, `Its result is of the dataset ${result.datasetSha256}; the version froze ${row.content_id}.`),
    ...told(result.replicates === row.replicate_count, `Its result has ${result.replicates} replicates; ${row.replicate_count} were noted.`),
    ...told(isDeepStrictEqual(row.summary.figures, result.figures), 'The figures that pages show are not those of its result.'),
  ];
};

/** Results that campaigns added, against their digests, the version they belong to and the figures that pages show. */
export const checkAdded: ScrubCheck = async ({ em }) => {
  const keys = await runSql<{ id: string; method: string }>(em, 'select entry_version_id as id, method from entry_result order by 1, 2');
  const findings: Finding[] = [];
  for (const { id, method } of keys) {
    const [row] = await runSql<AddedRow>(em, `
      select v.accession, v.version, r.method, v.content_id, r.replicate_count, r.result, r.result_sha256, encode(sha256(r.replicates), 'hex') as replicates_found, r.replicates_sha256, r.summary
        from entry_result r join entry_version v on v.id = r.entry_version_id where r.entry_version_id = $1 and r.method = $2`, [id, method]);
    if (row) findings.push(...addedFindings(row));
  }
  return { looked: keys.length, findings };
};
