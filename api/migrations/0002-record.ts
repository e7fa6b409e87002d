import { Migration } from '@mikro-orm/migrations';
import { freezeTable } from './freeze-table.ts';
import { recordRulesSql } from './record-rules.ts';

const digest = (column: string): string => `${column} text not null check (${column} ~ '^[0-9a-f]{64}$')`;
const states = `'draft', 'checking', 'blocked', 'ready', 'in-review', 'returned', 'declined', 'accepted', 'embargoed', 'frozen', 'superseded', 'withdrawn', 'cancelled'`;
const live = `state not in ('cancelled', 'declined', 'withdrawn')`;

/** Devices, run sheets, submissions, reviews and the record of frozen entries. */
export class Migration0002Record extends Migration {
  override up(): void {
    const statements = [
      `create table device (
        id text primary key check (id ~ '^[a-z0-9]+(-[a-z0-9]+)*$'), organisation_id uuid not null references organisation, name text not null,
        modality text not null check (modality in ('superconducting', 'trapped-ion', 'neutral-atom', 'photonic', 'spin', 'simulated', 'other')),
        created_by_id uuid references app_user, created_at timestamptz(3) not null)`,
      'create unique index device_name on device (organisation_id, lower(name))',
      ...freezeTable('device'),

      'create sequence run_sheet_number',
      `create table run_sheet (
        id text primary key check (id ~ '^RS-[0-9]{6,9}$'), organisation_id uuid not null references organisation, device_id text not null references device,
        gate_class text not null, register jsonb not null, circuits_asked int not null check (circuits_asked > 0), shots int not null check (shots > 0),
        state text not null check (state in ('waiting', 'drawing', 'drawn', 'failed')), progress double precision not null default 0 check (progress between 0 and 1),
        message text, created_by_id uuid not null references app_user, created_at timestamptz(3) not null, drawn_at timestamptz(3),
        circuits int, sealed int, total_shots bigint, rank int, condition_ratio double precision, draws int, sheet_sha256 text unique, seal_sha256 text unique,
        check (state <> 'drawn' or (drawn_at is not null and sheet_sha256 is not null and seal_sha256 is not null)))`,
      'create index run_sheet_organisation on run_sheet (organisation_id, created_at desc)',
      ...freezeTable('run_sheet', { onlyWhen: `old.state = 'drawn'` }),
      `create table run_sheet_file (run_sheet_id text primary key references run_sheet, bytes bytea not null, ${digest('sha256')})`,
      'alter table run_sheet_file alter column bytes set storage external',
      ...freezeTable('run_sheet_file'),
      'create table run_sheet_secret (run_sheet_id text primary key references run_sheet, seal jsonb not null)',
      ...freezeTable('run_sheet_secret'),

      'create sequence submission_number',
      `create table submission (
        id text primary key check (id ~ '^S-[0-9]{6,9}$'), organisation_id uuid not null references organisation, device_id text references device,
        run_sheet_id text references run_sheet, correction_of text, state text not null check (state in (${states})), round int not null check (round > 0),
        title text not null, gate_class text not null, register jsonb not null, file_id uuid not null, ${digest('content_id')},
        created_by_id uuid not null references app_user, created_at timestamptz(3) not null, changed_at timestamptz(3) not null,
        access text, interests text, embargo_until date, notes text,
        progress double precision not null default 0 check (progress between 0 and 1), stage text, replicates_done int, replicates int not null,
        checks jsonb not null, estimate_id uuid, claimed_by_id uuid references app_user, claimed_at timestamptz(3), sent_at timestamptz(3),
        accession text, version int, demo boolean not null default false)`,
      `create unique index submission_live_content on submission (content_id) where ${live}`,
      `create unique index submission_live_sheet on submission (run_sheet_id) where run_sheet_id is not null and correction_of is null and ${live}`,
      'create index submission_organisation on submission (organisation_id, created_at desc)',
      `create index submission_in_review on submission (sent_at) where state = 'in-review'`,
      `create table submission_file (
        id uuid primary key, submission_id text not null references submission deferrable initially deferred, round int not null, name text not null,
        bytes bytea not null, size int not null, ${digest('content_id')}, ${digest('bytes_sha256')}, summary jsonb not null,
        received_at timestamptz(3) not null, unique (submission_id, round))`,
      'alter table submission_file alter column bytes set storage external',
      ...freezeTable('submission_file'),
      'alter table submission add foreign key (file_id) references submission_file deferrable initially deferred',
      `create table submission_estimate (
        id uuid primary key, submission_id text not null references submission, round int not null, method text not null,
        result bytea not null, ${digest('result_sha256')}, replicates bytea not null, ${digest('replicates_sha256')}, replicate_count int not null,
        summary jsonb not null, drift jsonb not null, sealed_points jsonb not null, made_at timestamptz(3) not null, unique (submission_id, round))`,
      'alter table submission_estimate alter column result set storage external, alter column replicates set storage external',
      ...freezeTable('submission_estimate'),
      'alter table submission add foreign key (estimate_id) references submission_estimate',
      `create table submission_move (
        id bigint generated always as identity primary key, submission_id text not null references submission, move text not null, state text not null check (state in (${states})),
        at timestamptz(3) not null, by_name text, by_id uuid references app_user, reason text)`,
      'create index submission_move_submission on submission_move (submission_id, id)',
      ...freezeTable('submission_move'),
      `create table submission_message (
        id uuid primary key, submission_id text not null references submission, role text not null check (role in ('contributor', 'curator', 'registry')),
        author_id uuid references app_user, author_name text not null, organisation_name text, at timestamptz(3) not null, body text not null check (body <> ''))`,
      'create index submission_message_submission on submission_message (submission_id, at)',
      ...freezeTable('submission_message'),
      `create table decision (
        id uuid primary key, submission_id text not null references submission, round int not null, outcome text not null check (outcome in ('accepted', 'returned', 'declined')),
        reason text not null check (reason <> ''), curator_id uuid not null references app_user, at timestamptz(3) not null, unique (submission_id, round))`,
      ...freezeTable('decision'),

      'create table accession_counter (one boolean primary key default true check (one), last int not null check (last >= 0))',
      'insert into accession_counter (last) values (0)',
      ...freezeTable('accession_counter', { except: ['last'] }),
      `create table entry (
        accession text primary key check (accession ~ '^EVB-[0-9]{6,9}$'), organisation_id uuid not null references organisation, device_id text not null references device,
        gate_class text not null, register jsonb not null, created_at timestamptz(3) not null)`,
      ...freezeTable('entry'),
      `create table entry_version (
        id uuid primary key, accession text not null references entry, version int not null check (version > 0), submission_id text not null unique references submission,
        decision_id uuid not null unique references decision, organisation_id uuid not null references organisation, device_id text not null references device,
        gate_class text not null, register jsonb not null, run_sheet_id text references run_sheet, title text not null, method text not null, replicates int not null,
        file_name text not null, file_size int not null, ${digest('content_id')}, ${digest('bytes_sha256')}, ${digest('result_sha256')}, ${digest('replicates_sha256')},
        ended_at timestamptz(3) not null, dataset jsonb not null, summary jsonb not null, sealed_points jsonb not null, review jsonb not null, sealed boolean not null,
        accepted_at timestamptz(3) not null, embargo_until date, demo boolean not null default false, unique (accession, version))`,
      'create index entry_version_class on entry_version (gate_class)',
      'create index entry_version_device on entry_version (device_id)',
      ...freezeTable('entry_version'),
      `create table entry_bytes (
        accession text not null, version int not null, kind text not null check (kind in ('dataset', 'result', 'replicates', 'seal')), bytes bytea not null, ${digest('sha256')},
        primary key (accession, version, kind), foreign key (accession, version) references entry_version (accession, version))`,
      'alter table entry_bytes alter column bytes set storage external',
      ...freezeTable('entry_bytes'),
      `create table entry_state (
        id bigint generated always as identity primary key, accession text not null, version int not null, state text not null check (state in ('embargoed', 'frozen', 'superseded', 'withdrawn')),
        at timestamptz(3) not null, reason text, by_id uuid references app_user, foreign key (accession, version) references entry_version (accession, version))`,
      'create index entry_state_version on entry_state (accession, version, id desc)',
      ...freezeTable('entry_state'),
      ...recordRulesSql,
    ];
    for (const statement of statements) this.addSql(statement);
  }
}
