import type { Withdrawal } from '#shared/contracts/withdrawals.ts';
import { judge } from '#shared/domain/rules.ts';
import type { Caller } from '#api/lib/caller.ts';
import type { WithdrawalRow } from './load.ts';

export const presentWithdrawal = (row: WithdrawalRow, caller: Caller): Withdrawal => {
  const open = row.answer === null && judge('withdrawal.answer', caller.asker, { owner: row.organisation.id, state: row.state }).allowed;
  return {
    id: row.id, accession: row.accession, version: row.version, title: row.title, organisation: row.organisation.name, reason: row.reason, askedBy: row.askedBy.name, askedAt: row.askedAt.toISOString(),
    answer: row.answer, answeredBy: row.answeredBy, answeredAt: row.answeredAt?.toISOString() ?? null, note: row.note,
    may: { confirm: open && row.askedBy.id !== caller.user?.id, drop: open },
  };
};
