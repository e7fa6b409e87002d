import { Migration } from '@mikro-orm/migrations';
import { freezeTable } from './freeze-table.ts';

/** Second opinions on an estimate, and run sheets of another kind. */
export class Migration0004SecondOpinions extends Migration {
  override up(): void {
    const statements = [
      `create table second_opinion (
        estimate_id uuid primary key references submission_estimate, submission_id text not null references submission,
        state text not null check (state in ('waiting', 'done', 'failed')), reason text, opinions jsonb, official_seconds double precision,
        queued_at timestamptz(3) not null, made_at timestamptz(3),
        check (state <> 'done' or (opinions is not null and official_seconds is not null and made_at is not null)), check (state <> 'failed' or reason is not null))`,
      'create index second_opinion_submission on second_opinion (submission_id)',
      ...freezeTable('second_opinion', { onlyWhen: `old.state = 'done'` }),
      `alter table run_sheet add column kind text not null default 'random' check (kind in ('random', 'structured'))`,
    ];
    for (const statement of statements) this.addSql(statement);
  }
}
