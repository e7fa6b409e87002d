import { createPublicKey, verify } from 'node:crypto';
import { canonicalJson } from '#shared/formats/canonical-json.ts';
import { runSql } from '#api/lib/run-sql.ts';
import type { Work } from '#api/lib/work.ts';

interface Name {
  accession: string;
  version: number;
}

/** The row of a version as the database writes it, in its RFC 8785 form: whatever the page says, review summary included. */
export const recordBytes = async (em: Work['em'], { accession, version }: Name): Promise<Uint8Array | null> => {
  const [row] = await runSql<{ record: unknown }>(
    em,
    `select to_jsonb(v) || jsonb_build_object('ended_at', v.ended_at at time zone 'UTC', 'accepted_at', v.accepted_at at time zone 'UTC') as record
       from entry_version v where accession = $1 and version = $2`,
    [accession, version],
  );
  return row ? new TextEncoder().encode(canonicalJson(row.record)) : null;
};

/** Signs the row with the key of the log: whoever changes it later, however mighty in the database, cannot sign it anew. */
export const signRecord = async (work: Work, name: Name): Promise<void> => {
  const bytes = await recordBytes(work.em, name);
  if (!bytes) throw new Error(`${name.accession}.${name.version} has no row to sign.`);
  await runSql(work.em, 'insert into record_signature (accession, version, signature, key_id, public_key) values ($1, $2, $3, $4, $5)', [name.accession, name.version, work.logKey.sign(bytes), work.logKey.keyId, work.logKey.publicKey]);
};

/** Is this the signature of the bytes? False for anything that is no key or no signature. */
export const isSignedBy = (publicKey: string, bytes: Uint8Array, signature: string): boolean => {
  try {
    return verify(null, bytes, createPublicKey({ key: Buffer.from(publicKey, 'base64'), format: 'der', type: 'spki' }), Buffer.from(signature, 'base64'));
  } catch {
    return false;
  }
};
