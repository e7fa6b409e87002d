import { Migration } from '@mikro-orm/migrations';
import { freezeTable } from './freeze-table.ts';

const digest = (column: string): string => `${column} text not null check (${column} ~ '^[0-9a-f]{64}$')`;
const method = `method text not null check (method ~ '^M[1-9][0-9]{0,3}$')`;

/** Re-estimation campaigns under another method version, and the results that they add beside the frozen ones. */
export class Migration0005MethodCampaigns extends Migration {
  override up(): void {
    const statements = [
      'create sequence campaign_number',
      `create table campaign (
        id text primary key check (id ~ '^C-[0-9]{6,9}$'), ${method}, state text not null check (state in ('running', 'paused', 'finished', 'cancelled')),
        started_by_id uuid not null references app_user, started_at timestamptz(3) not null, changed_at timestamptz(3) not null, ended_at timestamptz(3),
        check ((state in ('finished', 'cancelled')) = (ended_at is not null)))`,
      // Two at once for the same version would do the same work twice.
      `create unique index campaign_open on campaign (method) where state in ('running', 'paused')`,
      ...freezeTable('campaign', { except: ['state', 'changed_at', 'ended_at'] }),
      `create table campaign_item (
        campaign_id text not null references campaign, entry_version_id uuid not null references entry_version, place int not null,
        state text not null check (state in ('waiting', 'queued', 'running', 'done', 'failed', 'skipped', 'cancelled')),
        job_id uuid, attempts int not null default 0, fault text, changed_at timestamptz(3) not null,
        primary key (campaign_id, entry_version_id), unique (campaign_id, place), check (state not in ('failed', 'skipped') or fault is not null))`,
      `create index campaign_item_open on campaign_item (campaign_id, place) where state in ('waiting', 'queued', 'running')`,
      ...freezeTable('campaign_item', { except: ['state', 'job_id', 'attempts', 'fault', 'changed_at'] }),
      `create table entry_result (
        entry_version_id uuid not null references entry_version, ${method}, campaign_id text not null references campaign,
        result bytea not null, ${digest('result_sha256')}, replicates bytea not null, ${digest('replicates_sha256')}, replicate_count int not null check (replicate_count > 0),
        summary jsonb not null, made_at timestamptz(3) not null, primary key (entry_version_id, method))`,
      'alter table entry_result alter column result set storage external, alter column replicates set storage external',
      'create index entry_result_method on entry_result (method)',
      ...freezeTable('entry_result'),
      // A second result under the frozen version's own method would put the frozen one in doubt; data that is not public, or no longer, is not estimated.
      `create function check_entry_result() returns trigger language plpgsql set search_path = pg_catalog, public, pg_temp as $$
declare v entry_version%rowtype; declare was text;
begin
  select * into v from entry_version where id = new.entry_version_id;
  if v.method = new.method then
    raise exception 'the frozen result is the one by its own method version' using errcode = 'EB003';
  end if;
  select state into was from entry_state s where s.accession = v.accession and s.version = v.version order by s.id desc limit 1;
  if was is null or was not in ('frozen', 'superseded') then
    raise exception 'a result is added to a public version only, not to one that is %', coalesce(was, 'without a state') using errcode = 'EB003';
  end if;
  return new;
end $$`,
      'create trigger entry_result_sound before insert on entry_result for each row execute function check_entry_result()',
      'alter table entry_result enable always trigger entry_result_sound',
    ];
    for (const statement of statements) this.addSql(statement);
  }
}
