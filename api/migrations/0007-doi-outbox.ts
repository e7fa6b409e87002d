import { Migration } from '@mikro-orm/migrations';
import { freezeTable } from './freeze-table.ts';

/**
 * DOIs owed and registered: one row a version, written with its freezing. What the agency must be told is counted in
 * `revision`, what it was told in `told`; a version that is superseded or withdrawn must be told again.
 */
export class Migration0007DoiOutbox extends Migration {
  override up(): void {
    const statements = [
      `create table doi_registration (
        accession text not null, version int not null, doi text not null unique check (doi ~ '^10\\.[0-9]{4,9}/[a-z0-9.-]+$'), owed_at timestamptz(3) not null,
        revision int not null default 1 check (revision > 0), told int not null default 0 check (told between 0 and revision), registered_at timestamptz(3),
        attempts int not null default 0, next_try_at timestamptz(3) not null, last_error text, check ((told > 0) = (registered_at is not null)),
        primary key (accession, version), foreign key (accession, version) references entry_version (accession, version))`,
      'create index doi_registration_owed on doi_registration (next_try_at) where told < revision',
      ...freezeTable('doi_registration', { except: ['revision', 'told', 'registered_at', 'attempts', 'next_try_at', 'last_error'] }),
      `create function tell_agency_again() returns trigger language plpgsql set search_path = pg_catalog, public, pg_temp as $$
begin
  update doi_registration d set revision = d.revision + 1, attempts = 0, next_try_at = new.at where d.accession = new.accession and d.version = new.version;
  return null;
end $$`,
      `create trigger entry_state_told after insert on entry_state for each row when (new.state in ('superseded', 'withdrawn')) execute function tell_agency_again()`,
      'alter table entry_state enable always trigger entry_state_told',
    ];
    for (const statement of statements) this.addSql(statement);
  }
}
