import type { EntityManager } from '@mikro-orm/postgresql';
import { AppError } from '#shared/errors/app-error.ts';
import { runSql, type SqlValue } from '#api/lib/run-sql.ts';

export interface WithdrawalRow {
  id: string;
  accession: string;
  version: number;
  title: string;
  organisation: { id: string; name: string };
  reason: string;
  askedBy: { id: string; name: string };
  askedAt: Date;
  answer: 'confirmed' | 'dropped' | null;
  answeredBy: string | null;
  answeredAt: Date | null;
  note: string | null;
  state: 'frozen' | 'superseded' | 'withdrawn';
}

interface Row {
  id: string;
  accession: string;
  version: number;
  title: string;
  organisation_id: string;
  organisation: string;
  reason: string;
  asked_by_id: string;
  asked_by: string;
  asked_at: string;
  answer: WithdrawalRow['answer'];
  answered_by: string | null;
  answered_at: string | null;
  note: string | null;
  state: WithdrawalRow['state'];
}

const read = async (em: EntityManager, rest: string, values: readonly SqlValue[]): Promise<WithdrawalRow[]> => {
  const rows = await runSql<Row>(
    em,
    `select w.id, w.accession, w.version, w.reason, w.asked_by_id, w.asked_at, v.title, o.id as organisation_id, o.name as organisation, s.state,
            asker.name as asked_by, a.answer, a.answered_at, nullif(a.note, '') as note, answerer.name as answered_by
       from withdrawal w join entry_version v using (accession, version) join organisation o on o.id = v.organisation_id join submission s on s.id = v.submission_id
       join app_user asker on asker.id = w.asked_by_id left join withdrawal_answer a on a.withdrawal_id = w.id left join app_user answerer on answerer.id = a.answered_by_id ${rest}`,
    values,
  );
  return rows.map((row) => ({
    id: row.id, accession: row.accession, version: row.version, title: row.title, organisation: { id: row.organisation_id, name: row.organisation }, reason: row.reason,
    askedBy: { id: row.asked_by_id, name: row.asked_by }, askedAt: new Date(row.asked_at), answer: row.answer, answeredBy: row.answered_by,
    answeredAt: row.answered_at === null ? null : new Date(row.answered_at), note: row.note, state: row.state,
  }));
};

export const findWithdrawal = async (em: EntityManager, id: string): Promise<WithdrawalRow> => {
  const [row] = await read(em, 'where w.id::text = $1', [id]);
  if (!row) throw new AppError('not-found', `There is no withdrawal ${JSON.stringify(id.slice(0, 40))}.`);
  return row;
};

/** Those that wait, the oldest first, then the newest answered; none of organisations that the reader has an interest in. */
export const listWithdrawals = (em: EntityManager, tied: readonly string[]): Promise<WithdrawalRow[]> =>
  read(em, 'where o.id::text <> all ($1::text[]) order by (a.answer is not null), case when a.answer is null then w.asked_at end, a.answered_at desc limit 100', [[...tied]]);
