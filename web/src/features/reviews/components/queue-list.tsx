import { Link } from 'react-router-dom';
import type { ReviewItem, ReviewQueue } from '#shared/contracts/reviews.ts';
import { capitalise, countInWords, plural } from '#shared/domain/format.ts';
import { roundWords, waitingWords } from '../queue-words.ts';

/** What waits, oldest first, with the reader's place marked; and what is kept from this curator. */
export function QueueList({ queue, current, now }: { queue: ReviewQueue; current: string | null; now: Date }) {
  return (
    <aside className="queue" aria-label="Review queue">
      <h2>Waiting</h2>
      {queue.items.length === 0 ? <p className="small quiet">Nothing waits for you.</p> : (
        <ol>
          {queue.items.map((item) => <QueueRow key={item.id} item={item} here={item.id === current} now={now} />)}
        </ol>
      )}
      <Kept kept={queue.kept} />
    </aside>
  );
}

function QueueRow({ item, here, now }: { item: ReviewItem; here: boolean; now: Date }) {
  const reader = item.claimedByMe ? 'claimed by you' : item.claimedBy ? `claimed by ${item.claimedBy}` : null;
  return (
    <li className={here ? 'own' : undefined}>
      <Link to={`/review/${item.id}`} aria-current={here ? 'page' : undefined}>
        <span className="name">{item.device?.name ?? item.title}</span>
        <span className="sub">{item.organisation}</span>
        <span className="sub">{[item.id, waitingWords(item.sentAt, now), roundWords(item.round)].filter(Boolean).join(', ')}</span>
        {reader ? <span className="sub">{reader}</span> : null}
      </Link>
    </li>
  );
}

function Kept({ kept }: Pick<ReviewQueue, 'kept'>) {
  if (kept.length === 0) return null;
  return (
    <div className="small quiet keptlist">
      <p>{capitalise(countInWords(kept.length))} more {plural(kept.length, 'is', 'are')} kept from you, because you belong, or belonged in the last 12 months, to {plural(kept.length, 'its', 'their')} organisation.</p>
      <details>
        <summary>Which</summary>
        <ul>{kept.map((k) => <li key={k.id}>{k.id}, {k.organisation}</li>)}</ul>
      </details>
    </div>
  );
}
