import { useQuery } from '@tanstack/react-query';
import { useMemo, useState } from 'react';
import { useNavigate } from 'react-router-dom';
import { BlankState, EmptyState } from '#web/components/blank-state.tsx';
import { ButtonLink } from '#web/components/button.tsx';
import { PageTitle } from '#web/components/page-title.tsx';
import { Read } from '#web/components/read.tsx';
import { reviewQuery, reviewQueueQuery } from '../api/reviews.ts';
import { nextInQueue } from '../queue-words.ts';
import { Case } from './case.tsx';
import { DecideColumn } from './decide-column.tsx';
import { DoneMessage } from './done-message.tsx';
import { QueueList } from './queue-list.tsx';
import type { Decided } from './decision-form.tsx';

/** The curator's desk: the queue, the case, the decision. Without an id it invites to the first case. */
export function ReviewDesk({ id }: { id: string | null }) {
  const queue = useQuery(reviewQueueQuery());
  const now = useMemo(() => new Date(), []);
  const [done, setDone] = useState<Decided | null>(null);
  const navigate = useNavigate();
  const decided = (answer: Decided): void => {
    setDone(answer);
    const next = nextInQueue(queue.data?.items ?? [], answer.submission);
    void navigate(next ? `/review/${next.id}` : '/review');
  };
  return (
    <div className="wrap desk">
      <Read level={2} query={queue} what="The review queue" loading="Loading the queue" rows={4}>
        {(data) => (
          <>
            <QueueList queue={data} current={id} now={now} />
            {id === null ? <Start count={data.items.length} first={data.items[0]?.id ?? null} done={done} /> : <OneCase key={id} id={id} done={done} onDecided={decided} />}
          </>
        )}
      </Read>
    </div>
  );
}

function Start({ count, first, done }: { count: number; first: string | null; done: Decided | null }) {
  return (
    <div className="case">
      <div className="casehead"><PageTitle>Review queue</PageTitle><h1>Review queue</h1></div>
      {done ? <DoneMessage decided={done} /> : null}
      <div className="blk">
        {first ? (
          <BlankState level={2} title={count === 1 ? 'One submission waits' : `${count} submissions wait`} act={<ButtonLink kind="first" to={`/review/${first}`}>Read the one that has waited longest</ButtonLink>}>
            Each shows its checks, its figures and its thread. Claim a case before you decide on it.
          </BlankState>
        ) : <EmptyState level={2} title="Nothing waits for you">New submissions appear here when a contributor sends them.</EmptyState>}
      </div>
    </div>
  );
}

function OneCase({ id, done, onDecided }: { id: string; done: Decided | null; onDecided: (answer: Decided) => void }) {
  const review = useQuery(reviewQuery(id));
  if (!review.data) {
    return (
      <div className="case">
        <PageTitle>{`Review ${id}`}</PageTitle>
        <h1 className="unseen">Review {id}</h1>
        <Read level={2} query={review} what="This case" loading={`Loading ${id}`} rows={6} missing={<BlankState level={2} title="There is no such case" act={<ButtonLink to="/review">Back to the queue</ButtonLink>}>Nothing in review has the number {id}. It may have been decided.</BlankState>}>{() => null}</Read>
      </div>
    );
  }
  return (
    <>
      <div>
        {done ? <DoneMessage decided={done} /> : null}
        <Case review={review.data} />
      </div>
      <DecideColumn review={review.data} onDecided={onDecided} />
    </>
  );
}
