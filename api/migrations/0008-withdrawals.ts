import { Migration } from '@mikro-orm/migrations';
import { freezeTable } from './freeze-table.ts';

const guarded = (name: string, table: string, run: string): string[] => [
  `create trigger ${name} before insert on ${table} for each row execute function ${run}()`,
  `alter table ${table} enable always trigger ${name}`,
];

/** Withdrawals: one curator asks with a reason, another confirms or drops it. */
export class Migration0008Withdrawals extends Migration {
  override up(): void {
    const statements = [
      `create table withdrawal (
        id uuid primary key, accession text not null, version int not null, reason text not null check (reason <> ''), asked_by_id uuid not null references app_user, asked_at timestamptz(3) not null,
        foreign key (accession, version) references entry_version (accession, version))`,
      'create index withdrawal_version on withdrawal (accession, version)',
      ...freezeTable('withdrawal'),
      `create table withdrawal_answer (
        withdrawal_id uuid primary key references withdrawal, answer text not null check (answer in ('confirmed', 'dropped')), note text not null, answered_by_id uuid not null references app_user, answered_at timestamptz(3) not null)`,
      ...freezeTable('withdrawal_answer'),
      `create function curator_without_interest(who uuid, at_entry text, at_version int, moment timestamptz) returns boolean language sql stable set search_path = pg_catalog, public, pg_temp as $$
  select exists (select 1 from role_grant r where r.user_id = who and r.role = 'curator' and r.since <= moment and (r.until is null or r.until > moment))
     and not exists (
       select 1 from membership m join entry_version v on v.organisation_id = m.organisation_id
        where v.accession = at_entry and v.version = at_version and m.user_id = who and m.since <= moment and (m.until is null or m.until > moment - interval '12 months'))
$$`,
      `create function check_withdrawal() returns trigger language plpgsql set search_path = pg_catalog, public, pg_temp as $$
begin
  if not curator_without_interest(new.asked_by_id, new.accession, new.version, new.asked_at) then
    raise exception 'a curator without interest asks for a withdrawal' using errcode = 'EB002';
  end if;
  if exists (select 1 from withdrawal w left join withdrawal_answer a on a.withdrawal_id = w.id where w.accession = new.accession and w.version = new.version and a.withdrawal_id is null) then
    raise exception 'a withdrawal of this version waits already' using errcode = 'EB003';
  end if;
  return new;
end $$`,
      ...guarded('withdrawal_sound', 'withdrawal', 'check_withdrawal'),
      `create function check_withdrawal_answer() returns trigger language plpgsql set search_path = pg_catalog, public, pg_temp as $$
declare asked withdrawal;
begin
  select * into asked from withdrawal where id = new.withdrawal_id;
  if not curator_without_interest(new.answered_by_id, asked.accession, asked.version, new.answered_at) then
    raise exception 'a curator without interest answers for a withdrawal' using errcode = 'EB002';
  end if;
  if new.answer = 'confirmed' and new.answered_by_id = asked.asked_by_id then
    raise exception 'a withdrawal takes two curators' using errcode = 'EB002';
  end if;
  return new;
end $$`,
      ...guarded('withdrawal_answer_sound', 'withdrawal_answer', 'check_withdrawal_answer'),
      // No version is withdrawn without two curators.
      `create function require_confirmed_withdrawal() returns trigger language plpgsql set search_path = pg_catalog, public, pg_temp as $$
begin
  if not exists (select 1 from withdrawal w join withdrawal_answer a on a.withdrawal_id = w.id where w.accession = new.accession and w.version = new.version and a.answer = 'confirmed') then
    raise exception 'a withdrawal takes two curators' using errcode = 'EB003';
  end if;
  return new;
end $$`,
      `create trigger entry_state_confirmed before insert on entry_state for each row when (new.state = 'withdrawn') execute function require_confirmed_withdrawal()`,
      'alter table entry_state enable always trigger entry_state_confirmed',
    ];
    for (const statement of statements) this.addSql(statement);
  }
}
