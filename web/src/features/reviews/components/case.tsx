import { useQueryClient } from '@tanstack/react-query';
import { useId, type ReactNode } from 'react';
import type { Review } from '#shared/contracts/reviews.ts';
import { formatCount } from '#shared/domain/format.ts';
import { DriftChart } from '#web/charts/drift-chart.tsx';
import { PreviewFigures } from '#web/charts/figure-beams.tsx';
import { Ledger } from '#web/components/facts.tsx';
import { Message } from '#web/components/message.tsx';
import { Thread, ThreadForm } from '#web/components/thread.tsx';
import { figureRows } from '#web/lib/figure-rows.ts';
import { reviewQuery, writeReviewMessage } from '../api/reviews.ts';
import { CaseChecks } from './case-checks.tsx';
import { CaseOpinions } from './case-opinions.tsx';
import { CaseHead } from './case-head.tsx';
import { DesignFacts, sealedSentence } from './design-facts.tsx';
import { EarlierEntries } from './earlier-entries.tsx';

function Block({ title, children }: { title: string; children: ReactNode }) {
  const id = useId();
  return <section className="blk" aria-labelledby={id}><h2 id={id}>{title}</h2>{children}</section>;
}

/** The middle column: everything a decision rests on. */
export function Case({ review }: { review: Review }) {
  const { submission: s, drift, earlier } = review;
  const client = useQueryClient();
  const write = async (body: string): Promise<void> => {
    await writeReviewMessage(s.id, body);
    await client.invalidateQueries({ queryKey: reviewQuery(s.id).queryKey });
  };
  return (
    <div className="case">
      <CaseHead review={review} />
      <Block title="Checks"><CaseChecks checks={s.checks} /></Block>
      <Block title="Drift">
        {drift.length === 0 ? <p className="says">The file names no blocks, so drift in time was not tested.</p> : <DriftChart blocks={drift} fileName={`${s.id}-drift`} />}
      </Block>
      {s.result ? (
        <>
          <Block title="Sealed circuits"><p className="says">{sealedSentence(s.result.sealedCheck)}</p></Block>
          <Block title="Figures">
            {s.result.warnings.length > 0 ? <Message kind="caution">{s.result.warnings.map((w) => <p key={w}>{w}</p>)}</Message> : null}
            <PreviewFigures caption="As they will be published" quiet={`by method ${s.result.method}, from ${formatCount(s.result.replicates)} replicates`} rows={figureRows(s.result.figures, s)} />
          </Block>
          <Block title="Second opinions"><CaseOpinions submission={s} /></Block>
          <Block title="Design"><DesignFacts patches={s.result.patches} register={s.register} /></Block>
          <Block title="Earlier entries of the device"><EarlierEntries earlier={earlier} submission={s} /></Block>
        </>
      ) : null}
      <Block title="Record">
        <Ledger items={[
          { term: 'How the device was reached', value: s.record.access ?? 'not filled in' }, { term: 'Interests', value: s.record.interests ?? 'not filled in' },
          { term: 'Embargo until', value: s.record.embargoUntil ?? 'none' }, { term: 'Notes', value: s.record.notes ?? 'none' },
        ]} />
      </Block>
      <Block title="Thread">
        <Thread messages={s.messages} />
        <ThreadForm onWrite={write} />
      </Block>
    </div>
  );
}
