import { Migration } from '@mikro-orm/migrations';

/**
 * Factors of the designs of run sheets, so that a further dataset on the same sheet costs two triangular solutions. No part of
 * the record: every row may be thrown away at any time and is worked out again when it is wanted.
 */
export class Migration0003DesignFactors extends Migration {
  override up(): void {
    const statements = [
      `create table design_factor (
        key text primary key check (key ~ '^[0-9a-f]{64}$'), run_sheet_id text not null references run_sheet, bytes bytea not null,
        used_at timestamptz(3) not null)`,
      // Doubles of a triangle do not shrink by compression.
      'alter table design_factor alter column bytes set storage external',
      'create index design_factor_sheet on design_factor (run_sheet_id)',
      'create index design_factor_used on design_factor (used_at)',
    ];
    for (const statement of statements) this.addSql(statement);
  }
}
