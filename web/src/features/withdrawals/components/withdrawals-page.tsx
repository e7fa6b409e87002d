import { useQuery } from '@tanstack/react-query';
import { useSearchParams } from 'react-router-dom';
import type { Withdrawal } from '#shared/contracts/withdrawals.ts';
import { formatDate } from '#shared/domain/format-date.ts';
import { AccessionLink } from '#web/components/accession-link.tsx';
import { DataTable, type Column } from '#web/components/data-table.tsx';
import { PageHead } from '#web/components/page-head.tsx';
import { Read } from '#web/components/read.tsx';
import { Section } from '#web/components/section.tsx';
import { Wrap } from '#web/components/wrap.tsx';
import { withdrawalsQuery } from '../api/withdrawals.ts';
import { AskForm } from './ask-form.tsx';
import { WaitingWithdrawal } from './waiting-withdrawal.tsx';

const columns: readonly Column<Withdrawal>[] = [
  { id: 'entry', header: 'Version', rowHeader: true, nowrap: true, cell: (w) => <AccessionLink accession={w.accession} version={w.version} /> },
  { id: 'answer', header: 'Answer', cell: (w) => (w.answer === 'confirmed' ? 'Withdrawn' : 'Dropped') },
  { id: 'reason', header: 'Reason', cell: (w) => <>{w.reason}{w.note ? <span className="sub">Dropped: {w.note}</span> : null}</> },
  { id: 'by', header: 'By', cell: (w) => <>{w.askedBy}<span className="sub">then {w.answeredBy}</span></> },
  { id: 'at', header: 'Answered', nowrap: true, sortBy: (w) => w.answeredAt, cell: (w) => (w.answeredAt ? formatDate(w.answeredAt) : '') },
];

/** Withdrawals: what waits for a second curator, a form to ask for one, and what was answered. */
export function WithdrawalsPage() {
  const [search] = useSearchParams();
  const query = useQuery(withdrawalsQuery());
  return (
    <Wrap>
      <PageHead slim title="Withdrawals" opening="A public version is withdrawn by two curators, with a public reason. It cannot be taken back." />
      <Read level={2} query={query} what="The list of withdrawals" loading="Loading the withdrawals" rows={4}>
        {({ items }) => {
          const waiting = items.filter((w) => w.answer === null);
          const answered = items.filter((w) => w.answer !== null);
          return (
            <>
              <Section title="Waiting" aside="For a second curator.">{waiting.length > 0 ? waiting.map((w) => <WaitingWithdrawal key={w.id} asked={w} />) : <p className="prose quiet">None waits.</p>}</Section>
              <Section title="Ask for one"><AskForm key={search.get('entry') ?? ''} entry={search.get('entry') ?? ''} /></Section>
              {answered.length > 0 ? <Section title="Answered"><DataTable caption="Answered withdrawals" captionHidden columns={columns} rows={answered} rowKey={(w) => w.id} /></Section> : null}
            </>
          );
        }}
      </Read>
    </Wrap>
  );
}
