import { versionedAccessionOf } from '#shared/domain/ids.ts';
import { runSql } from '#api/lib/run-sql.ts';
import type { Finding, ScrubCheck } from './finding.ts';

interface Row {
  accession: string;
  version: number;
  states: string[] | null;
  leaves: string[] | null;
  submission: string;
}

const orders = [
  ['embargoed'], ['frozen'], ['frozen', 'superseded'], ['frozen', 'withdrawn'], ['frozen', 'superseded', 'withdrawn'],
  ['embargoed', 'frozen'], ['embargoed', 'frozen', 'superseded'], ['embargoed', 'frozen', 'withdrawn'], ['embargoed', 'frozen', 'superseded', 'withdrawn'],
].map((order) => order.join(' '));

/** The states of every version: an order that exists, each public one with its leaf, and the submission in the last of them. */
export const checkStates: ScrubCheck = async ({ em }) => {
  const rows = await runSql<Row>(
    em,
    `select v.accession, v.version,
            (select array_agg(s.state order by s.id) from entry_state s where s.accession = v.accession and s.version = v.version) as states,
            (select array_agg(l.event order by l.index) from log_leaf l where l.accession = v.accession and l.version = v.version) as leaves,
            (select state from submission where id = v.submission_id) as submission
       from entry_version v order by 1, 2`,
  );
  const findings: Finding[] = [];
  for (const row of rows) {
    const where = versionedAccessionOf(row.accession, row.version);
    const states = row.states ?? [];
    const logged = states.filter((s) => s === 'frozen' || s === 'withdrawn').join(', ');
    const leaves = (row.leaves ?? []).join(', ');
    if (!orders.includes(states.join(' '))) findings.push({ where, sentence: `Its states are ${states.join(', ') || 'none'}: no version goes that way.` });
    if (logged !== leaves) findings.push({ where, sentence: `It was ${logged || 'never public'} by its states and ${leaves || 'never public'} by the log.` });
    if (row.submission !== states.at(-1)) findings.push({ where, sentence: `It is ${states.at(-1) ?? 'nowhere'}, but its submission is ${row.submission}.` });
  }
  return { looked: rows.length, findings };
};
