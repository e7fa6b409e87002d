import { generateKeyPairSync } from 'node:crypto';
import pg from 'pg';
import { afterEach, beforeAll, describe, expect, inject, it } from 'vitest';
import { adminRole } from '#api/cli/postgres/cluster.ts';
import { addressOf } from '#api/cli/postgres/roles.ts';
import { testPasswords } from '#api/cli/postgres/test-cluster.ts';
import { readLogKey } from '#api/lib/log-key.ts';
import { scrub } from '#api/modules/scrub/scrub.ts';
import { signRecord } from '#api/modules/log/record-signature.ts';
import { makeDataset, makeDesk, makeDrawnSheet, workFor, type Desk } from '#tests/support/record.ts';
import { accepted, withdrawn } from '#tests/support/life.ts';
import { useTestApp } from '#tests/support/test-app.ts';

const app = useTestApp();
let desk: Desk;
const found = () => scrub({ em: app().deps.orm.em.fork(), trustedKeys: [app().deps.logKey.keyId] });

beforeAll(async () => {
  desk = await makeDesk(app());
  const first = await accepted(app(), desk, makeDataset(desk, await makeDrawnSheet(app(), desk)));
  await accepted(app(), desk, makeDataset(desk, null), { correctionOf: first.accession });
  await withdrawn(app(), await accepted(app(), desk, makeDataset(desk, null)), 'the wrong qubit was recorded');
  await accepted(app(), desk, makeDataset(desk, null));
});

/** As a database superuser who puts the triggers out of action, and puts back what was changed. */
const asSuperuser = async (sql: readonly string[]): Promise<void> => {
  const client = new pg.Client({ connectionString: addressOf(adminRole, testPasswords.admin, inject('postgresPort'), app().database.name) });
  await client.connect();
  try {
    const { rows } = await client.query<{ t: string }>(`select distinct tgrelid::regclass::text as t from pg_trigger where not tgisinternal and tgrelid::regclass::text not like 'pgboss%'`);
    for (const { t } of rows) await client.query(`alter table ${t} disable trigger all`);
    for (const statement of sql) await client.query(statement);
  } finally {
    await client.end();
  }
};

let undo: readonly string[] = [];
const tamper = async (change: string, back: string): Promise<void> => {
  await asSuperuser([change]);
  undo = [back];
};
afterEach(async () => {
  await asSuperuser(undo);
  undo = [];
});

const flip = (column: string): string => `set_byte(${column}, 20, get_byte(${column}, 20) # 1)`;
const both = (sql: string): [string, string] => [sql, sql];
const first = `where accession = 'EVB-000001' and version = 1`;

const kinds: [what: string, change: string, back: string, where: RegExp][] = [
  ['a byte of a frozen dataset', ...both(`update entry_bytes set bytes = ${flip('bytes')} ${first} and kind = 'dataset'`), /EVB-000001\.1/],
  ['a byte of a frozen result', ...both(`update entry_bytes set bytes = ${flip('bytes')} ${first} and kind = 'result'`), /EVB-000001\.1/],
  ['a byte of the replicates', ...both(`update entry_bytes set bytes = ${flip('bytes')} ${first} and kind = 'replicates'`), /EVB-000001\.1/],
  ['a result together with its digests', `with b as (update entry_bytes set bytes = ${flip('bytes')}, sha256 = encode(sha256(${flip('bytes')}), 'hex') ${first} and kind = 'result' returning sha256) update entry_version set result_sha256 = b.sha256 from b ${first}`, `with b as (update entry_bytes set bytes = ${flip('bytes')}, sha256 = encode(sha256(${flip('bytes')}), 'hex') ${first} and kind = 'result' returning sha256) update entry_version set result_sha256 = b.sha256 from b ${first}`, /EVB-000001\.1|leaf 0/],
  ['the method version', `update entry_version set method = 'M9' ${first}`, `update entry_version set method = 'M1' ${first}`, /EVB-000001\.1/],
  ['the review summary', `update entry_version set review = jsonb_set(review, '{note}', '"splendid"') ${first}`, `update entry_version set review = jsonb_set(review, '{note}', '"Sound throughout."') ${first}`, /EVB-000001\.1/],
  ['a figure as pages show it', `update entry_version set summary = jsonb_set(summary, '{replicates}', '1') ${first}`, `update entry_version set summary = jsonb_set(summary, '{replicates}', '20') ${first}`, /EVB-000001\.1/],
  ['a revealed seal', ...both(`update entry_bytes set bytes = ${flip('bytes')} ${first} and kind = 'seal'`), /EVB-000001\.1/],
  ['a run sheet', ...both(`update run_sheet_file set bytes = ${flip('bytes')}`), /RS-/],
  ['the data of a leaf', ...both(`update log_leaf set data = ${flip('data')} where index = 1`), /leaf 1/],
  ['a leaf together with its hash', `update log_leaf set data = ${flip('data')}, hash = encode(sha256('\\x00'::bytea || ${flip('data')}), 'hex') where index = 1`, `update log_leaf set data = ${flip('data')}, hash = encode(sha256('\\x00'::bytea || ${flip('data')}), 'hex') where index = 1`, /leaf 1|the log/],
  ['a stored subtree', ...both(`update log_node set hash = translate(hash, '0123456789abcdef', '1032547698badcfe') where level = 1 and index = 0`), /the log/],
  ['the root of a head', ...both(`update log_head set root_hash = translate(root_hash, '0123456789abcdef', '1032547698badcfe') where tree_size = 2`), /head over 2/],
  ['a withdrawal that is taken back', `delete from entry_state where state = 'withdrawn'`, `insert into entry_state (accession, version, state, at, reason) values ('EVB-000002', 1, 'withdrawn', now(), 'again')`, /EVB-000002\.1/],
  ['the state of a submission', `update submission set state = 'in-review' where accession = 'EVB-000003'`, `update submission set state = 'frozen' where accession = 'EVB-000003'`, /EVB-000003\.1/],
  ['a submitted file', ...both(`update submission_file set bytes = ${flip('bytes')} where submission_id = (select submission_id from entry_version where accession = 'EVB-000003')`), /S-/],
];

describe('scrub', () => {
  it('finds nothing where nothing was changed, and has looked at every part', async () => {
    const { looked, findings } = await found();
    expect(findings).toEqual([]);
    expect(looked).toBeGreaterThan(40);
  });

  it.each(kinds)('finds %s, changed by a superuser, with its place', async (_, change, back, where) => {
    await tamper(change, back);
    const { findings } = await found();
    expect(findings.length).toBeGreaterThan(0);
    expect(findings.some((f) => where.test(f.where)), JSON.stringify(findings)).toBe(true);
    await asSuperuser([back]);
    undo = [];
    expect((await found()).findings, 'after it was put back').toEqual([]);
  });

  it('finds a row that was changed and signed anew with another key', async () => {
    const foreign = readLogKey(generateKeyPairSync('ed25519').privateKey.export({ format: 'der', type: 'pkcs8' }).toString('base64'));
    await asSuperuser([`create table kept as select * from record_signature ${first}`, `delete from record_signature ${first}`, `update entry_version set title = title || '!' ${first}`]);
    undo = [`delete from record_signature ${first}`, 'insert into record_signature select * from kept', 'drop table kept', `update entry_version set title = left(title, -1) ${first}`];
    await signRecord({ ...(await workFor(app(), null)), logKey: foreign }, { accession: 'EVB-000001', version: 1 });
    expect((await found()).findings).toEqual([{ where: 'EVB-000001.1', sentence: `Its row is signed with a key that is not the registry's, ${foreign.keyId}.` }]);
  });
});
