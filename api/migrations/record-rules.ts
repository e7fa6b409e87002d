/**
 * Rules that the database itself holds over the record, behind the services that hold them first. Each function names
 * its search path, temporary tables last: otherwise a role that may make temporary tables could put one in a table's place.
 */

/** A row trigger that also fires in replication mode. */
const always = (name: string, table: string, events: string, run: string): string[] => [
  `create trigger ${name} ${events} on ${table} for each row execute function ${run}()`,
  `alter table ${table} enable always trigger ${name}`,
];

export const recordRulesSql = [
  // No decision on one's own organisation, of now or of the last 12 months, and none without the office.
  `create function refuse_interested_decision() returns trigger language plpgsql set search_path = pg_catalog, public, pg_temp as $$
begin
  if exists (
    select 1 from membership m join submission s on s.organisation_id = m.organisation_id
     where s.id = new.submission_id and m.user_id = new.curator_id and m.since <= new.at
       and (m.until is null or m.until > new.at - interval '12 months')) then
    raise exception 'a curator does not decide on an organisation of their own' using errcode = 'EB002';
  end if;
  if not exists (
    select 1 from role_grant r where r.user_id = new.curator_id and r.role = 'curator' and r.since <= new.at and (r.until is null or r.until > new.at)) then
    raise exception 'only a curator decides' using errcode = 'EB002';
  end if;
  return new;
end $$`,
  ...always('decision_without_interest', 'decision', 'before insert', 'refuse_interested_decision'),

  // Accessions are counted without gaps.
  `create function step_by_one() returns trigger language plpgsql set search_path = pg_catalog, public, pg_temp as $$
begin
  if new.last <> old.last + 1 then
    raise exception 'accessions are counted one by one' using errcode = 'EB003';
  end if;
  return new;
end $$`,
  ...always('accession_step', 'accession_counter', 'before update', 'step_by_one'),

  // A version follows from an accepting decision on its own submission, and versions are counted without gaps.
  `create function check_entry_version() returns trigger language plpgsql set search_path = pg_catalog, public, pg_temp as $$
begin
  if not exists (select 1 from decision d where d.id = new.decision_id and d.submission_id = new.submission_id and d.outcome = 'accepted') then
    raise exception 'a version needs an accepting decision' using errcode = 'EB003';
  end if;
  if new.version <> 1 + (select coalesce(max(version), 0) from entry_version v where v.accession = new.accession) then
    raise exception 'versions are counted one by one' using errcode = 'EB003';
  end if;
  return new;
end $$`,
  ...always('entry_version_sound', 'entry_version', 'before insert', 'check_entry_version'),

  // embargoed -> frozen -> superseded -> withdrawn, never back.
  `create function check_entry_state() returns trigger language plpgsql set search_path = pg_catalog, public, pg_temp as $$
declare was text;
begin
  select state into was from entry_state s where s.accession = new.accession and s.version = new.version order by id desc limit 1;
  if not (
       (was is null and new.state in ('embargoed', 'frozen'))
    or (was = 'embargoed' and new.state = 'frozen')
    or (was = 'frozen' and new.state in ('superseded', 'withdrawn'))
    or (was = 'superseded' and new.state = 'withdrawn')) then
    raise exception 'a version does not go from % to %', coalesce(was, 'nothing'), new.state using errcode = 'EB003';
  end if;
  return new;
end $$`,
  ...always('entry_state_order', 'entry_state', 'before insert', 'check_entry_state'),
];
