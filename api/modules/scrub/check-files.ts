import { canonicalJson, contentIdOf, sha256Hex } from '#shared/formats/canonical-json.ts';
import type { RunSheet, Seal } from '#shared/formats/types.ts';
import { checkSeal } from '#shared/runsheet/seal.ts';
import { versionedAccessionOf } from '#shared/domain/ids.ts';
import { runSql } from '#api/lib/run-sql.ts';
import { readSheetSeal } from '#api/modules/run-sheets/sheet-store.ts';
import type { Finding, ScrubCheck } from './finding.ts';

interface SheetRow {
  run_sheet_id: string;
  bytes: Buffer;
  sha256: string;
  sheet_sha256: string;
  seal: Seal | null;
}

const sheetFindings = (row: SheetRow): Finding[] => {
  const where = row.run_sheet_id;
  const digest = sha256Hex(row.bytes);
  if (digest !== row.sha256) return [{ where, sentence: `Its bytes have the SHA-256 ${digest}; ${row.sha256} was stored beside them.` }];
  const sheet = JSON.parse(row.bytes.toString('utf8')) as RunSheet;
  if (contentIdOf(sheet) !== row.sheet_sha256) return [{ where, sentence: `Its content id is ${contentIdOf(sheet)}; it was drawn with ${row.sheet_sha256}.` }];
  if (!row.seal) return [{ where, sentence: 'Its seal is missing.' }];
  return checkSeal(row.seal, sheet).map(({ pointer, message }) => ({ where, sentence: `Its seal does not fit it: ${pointer}: ${message}` }));
};

/** Run sheets against the digests they were handed out with, and seals against the commitments in them. */
export const checkSheets: ScrubCheck = async ({ em }) => {
  const ids = await runSql<{ id: string }>(em, `select id from run_sheet where state = 'drawn' order by id`);
  const findings: Finding[] = [];
  for (const { id } of ids) {
    const [row] = await runSql<Omit<SheetRow, 'seal'>>(em, 'select f.*, s.sheet_sha256 from run_sheet_file f join run_sheet s on s.id = f.run_sheet_id where f.run_sheet_id = $1', [id]);
    findings.push(...(row ? sheetFindings({ ...row, seal: await readSheetSeal(em, id) }) : [{ where: id, sentence: 'Its file is missing.' }]));
  }
  return { looked: ids.length, findings };
};

/** The seal that went into a frozen version is the one of its sheet. */
export const checkRevealedSeals: ScrubCheck = async ({ em }) => {
  const rows = await runSql<{ accession: string; version: number; bytes: Buffer; run_sheet_id: string | null }>(em, `
    select b.accession, b.version, b.bytes, v.run_sheet_id from entry_bytes b join entry_version v using (accession, version) where b.kind = 'seal' order by 1, 2`);
  const findings: Finding[] = [];
  for (const row of rows) {
    const seal = row.run_sheet_id === null ? null : await readSheetSeal(em, row.run_sheet_id);
    if (!seal || canonicalJson(seal) !== row.bytes.toString('utf8')) findings.push({ where: versionedAccessionOf(row.accession, row.version), sentence: 'Its seal is not the seal of its run sheet.' });
  }
  return { looked: rows.length, findings };
};

/** What was submitted and estimated on the way to a version, hashed again. */
export const checkSubmitted: ScrubCheck = async ({ em }) => {
  const findings: Finding[] = [];
  let looked = 0;
  for (const [table, column, digest] of [['submission_file', 'bytes', 'bytes_sha256'], ['submission_estimate', 'result', 'result_sha256'], ['submission_estimate', 'replicates', 'replicates_sha256']] as const) {
    const rows = await runSql<{ where: string; stored: string; found: string }>(em, `select submission_id || ', round ' || round as "where", ${digest} as stored, encode(sha256(${column}), 'hex') as found from ${table} order by 1`);
    looked += rows.length;
    findings.push(...rows.filter((row) => row.stored !== row.found).map((row) => ({ where: row.where, sentence: `The bytes of its ${column === 'bytes' ? 'dataset' : column} have the SHA-256 ${row.found}; ${row.stored} was stored beside them.` })));
  }
  return { looked, findings };
};
