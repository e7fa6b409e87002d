import { Migration } from '@mikro-orm/migrations';
import { freezeTable } from './freeze-table.ts';

const hash = (column: string): string => `${column} text not null check (${column} ~ '^[0-9a-f]{64}$')`;

/** The log: a Merkle tree with a leaf for every freezing and withdrawal, its full subtrees, its signed heads, and a signature over each version's own row. */
export class Migration0006Log extends Migration {
  override up(): void {
    const statements = [
      'create table log_size (one boolean primary key default true check (one), size int not null check (size >= 0))',
      'insert into log_size (size) values (0)',
      ...freezeTable('log_size', { except: ['size'] }),
      `create function grow_by_one() returns trigger language plpgsql set search_path = pg_catalog, public, pg_temp as $$
begin
  if new.size <> old.size + 1 then
    raise exception 'the log grows leaf by leaf' using errcode = 'EB003';
  end if;
  return new;
end $$`,
      'create trigger log_step before update on log_size for each row execute function grow_by_one()',
      'alter table log_size enable always trigger log_step',
      `create table log_leaf (
        index int primary key check (index >= 0), event text not null check (event in ('frozen', 'withdrawn')), accession text not null, version int not null,
        data bytea not null, ${hash('hash')}, at timestamptz(3) not null,
        unique (accession, version, event), foreign key (accession, version) references entry_version (accession, version))`,
      ...freezeTable('log_leaf'),
      `create table log_node (level int not null check (level >= 0), index int not null check (index >= 0), ${hash('hash')}, primary key (level, index))`,
      ...freezeTable('log_node'),
      `create table log_head (
        tree_size int primary key check (tree_size > 0), ${hash('root_hash')}, at timestamptz(3) not null, signature text not null, key_id text not null, public_key text not null)`,
      ...freezeTable('log_head'),
      `create table record_signature (
        accession text not null, version int not null, signature text not null, key_id text not null, public_key text not null,
        primary key (accession, version), foreign key (accession, version) references entry_version (accession, version))`,
      ...freezeTable('record_signature'),
      // Nothing becomes public, and nothing is withdrawn, without its leaf in the same transaction.
      `create function require_leaf() returns trigger language plpgsql set search_path = pg_catalog, public, pg_temp as $$
begin
  if not exists (select 1 from log_leaf l where l.accession = new.accession and l.version = new.version and l.event = new.state) then
    raise exception '% version % is % without a leaf in the log', new.accession, new.version, new.state using errcode = 'EB003';
  end if;
  return null;
end $$`,
      `create constraint trigger entry_state_logged after insert on entry_state deferrable initially deferred
         for each row when (new.state in ('frozen', 'withdrawn')) execute function require_leaf()`,
      'alter table entry_state enable always trigger entry_state_logged',
    ];
    for (const statement of statements) this.addSql(statement);
  }
}
