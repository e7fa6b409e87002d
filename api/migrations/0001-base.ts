import { Migration } from '@mikro-orm/migrations';
import { freezeFunctionsSql, freezeTable } from './freeze-table.ts';

/** People, organisations, roles, sessions, tokens, the audit trail, mail owed, attempts at jobs. */
export class Migration0001Base extends Migration {
  override up(): void {
    const statements = [
      ...freezeFunctionsSql,
      `create table app_user (
        id uuid primary key, subject text unique, email text not null unique check (email = lower(email)), name text not null,
        created_at timestamptz(3) not null, last_sign_in_at timestamptz(3), disabled_at timestamptz(3))`,
      `create table organisation (
        id uuid primary key, slug text not null unique check (slug ~ '^[a-z0-9]+(-[a-z0-9]+)*$'), name text not null unique,
        kind text not null check (kind in ('provider', 'laboratory', 'buyer', 'registry')), created_at timestamptz(3) not null)`,
      `create table membership (
        id uuid primary key, user_id uuid not null references app_user, organisation_id uuid not null references organisation,
        role text not null check (role in ('contributor', 'editor', 'viewer', 'member')),
        since timestamptz(3) not null, until timestamptz(3) check (until >= since))`,
      'create index membership_user on membership (user_id)',
      'create index membership_organisation on membership (organisation_id)',
      'create unique index membership_current on membership (user_id, organisation_id, role) where until is null',
      `create table role_grant (
        id uuid primary key, user_id uuid not null references app_user, role text not null check (role in ('curator', 'steward')),
        since timestamptz(3) not null, until timestamptz(3) check (until >= since))`,
      'create unique index role_grant_current on role_grant (user_id, role) where until is null',
      `create table session (sid text primary key, sess json not null, expire timestamp(6) not null)`,
      'create index session_by_expiry on session (expire)',
      `create index session_by_user on session ((sess #>> '{passport,user}'))`,
      `create table api_token (
        id uuid primary key, organisation_id uuid not null references organisation, created_by_id uuid not null references app_user,
        name text not null, prefix text not null, sha256 text not null unique, created_at timestamptz(3) not null,
        expires_at timestamptz(3), last_used_at timestamptz(3), revoked_at timestamptz(3))`,
      'create index api_token_organisation on api_token (organisation_id)',
      `create table audit_event (
        id bigint generated always as identity primary key, at timestamptz(3) not null, action text not null,
        actor_kind text not null check (actor_kind in ('person', 'token', 'registry')), actor_id uuid, organisation_id uuid,
        subject_type text not null, subject_id text not null, request_id text, detail jsonb not null default '{}')`,
      'create index audit_event_subject on audit_event (subject_type, subject_id, id)',
      'create index audit_event_at on audit_event (at)',
      ...freezeTable('audit_event'),
      `create table idempotency_key (
        id uuid primary key, scope text not null, key text not null, fingerprint text not null, status int not null,
        headers jsonb not null, body jsonb, created_at timestamptz(3) not null, unique (scope, key))`,
      'create index idempotency_key_created on idempotency_key (created_at)',
      `create table mail_outbox (
        id uuid primary key, recipient text not null, subject text not null, body text not null, topic text not null, topic_id text not null,
        queued_at timestamptz(3) not null, sent_at timestamptz(3), attempts int not null default 0, last_error text)`,
      'create index mail_outbox_unsent on mail_outbox (queued_at) where sent_at is null',
      ...freezeTable('mail_outbox', { except: ['sent_at', 'attempts', 'last_error'] }),
      `create table job_run (
        id uuid primary key, queue text not null, subject text, attempt int not null, worker_key int not null, stage text,
        fraction double precision not null default 0, started_at timestamptz(3) not null, updated_at timestamptz(3) not null,
        finished_at timestamptz(3), outcome text check (outcome in ('done', 'failed', 'lost')), error text)`,
      'create index job_run_subject on job_run (subject, started_at desc)',
      'create index job_run_open on job_run (worker_key) where finished_at is null',
    ];
    for (const statement of statements) this.addSql(statement);
  }
}
