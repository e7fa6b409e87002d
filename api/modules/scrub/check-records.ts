import { versionedAccessionOf } from '#shared/domain/ids.ts';
import { runSql } from '#api/lib/run-sql.ts';
import { isSignedBy, recordBytes } from '#api/modules/log/record-signature.ts';
import type { Finding, ScrubCheck } from './finding.ts';

interface Row {
  accession: string;
  version: number;
  signature: string | null;
  key_id: string | null;
  public_key: string | null;
}

/** The row of every version against its signature: titles, figures as pages show them, method, review summary. */
export const checkRecords: ScrubCheck = async ({ em, trustedKeys }) => {
  const rows = await runSql<Row>(em, 'select v.accession, v.version, s.signature, s.key_id, s.public_key from entry_version v full join record_signature s using (accession, version) order by 1, 2');
  const findings: Finding[] = [];
  for (const row of rows) {
    const where = versionedAccessionOf(row.accession, row.version);
    const bytes = await recordBytes(em, row);
    if (!bytes) findings.push({ where, sentence: 'Its signature is there, its row is not.' });
    else if (!row.signature || !row.public_key) findings.push({ where, sentence: 'Its row is not signed.' });
    else if (!trustedKeys.includes(row.key_id ?? '')) findings.push({ where, sentence: `Its row is signed with a key that is not the registry's, ${row.key_id}.` });
    else if (!isSignedBy(row.public_key, bytes, row.signature)) findings.push({ where, sentence: 'Its row is not the row that was signed at freezing.' });
  }
  return { looked: rows.length, findings };
};
