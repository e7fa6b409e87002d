import { useMutation, useQueryClient } from '@tanstack/react-query';
import type { Review } from '#shared/contracts/reviews.ts';
import { stateWords } from '#shared/domain/life-cycle.ts';
import { Button } from '#web/components/button.tsx';
import { Message } from '#web/components/message.tsx';
import { asApiError } from '#web/lib/api-error.ts';
import { claimReview, reviewQuery, reviewQueueQuery } from '../api/reviews.ts';
import { DecisionForm, type Decided } from './decision-form.tsx';

/** The right column: claim first, then decide; or why neither is open. */
export function DecideColumn({ review, onDecided }: { review: Review; onDecided: (decided: Decided) => void }) {
  const id = review.submission.id;
  const client = useQueryClient();
  const claim = useMutation({ mutationFn: () => claimReview(id), onSuccess: (answer) => { client.setQueryData(reviewQuery(id).queryKey, answer); void client.invalidateQueries({ queryKey: reviewQueueQuery().queryKey }); } });
  if (review.claimedByMe && review.may.decide) return <DecisionForm key={id} review={review} onDecided={onDecided} />;
  return (
    <section className="decide" aria-labelledby="decision">
      <h2 id="decision">Decision</h2>
      {review.submission.state !== 'in-review' ? <p className="says">It is not in review; its state is “{stateWords[review.submission.state].toLowerCase()}”.</p>
        : review.claimedBy && !review.claimedByMe ? <p className="says">{review.claimedBy} has claimed this case. It opens to you when they release it.</p>
        : <p className="says">Claim the case to decide on it. Other curators then see that you are reading it.</p>}
      {claim.isError ? <Message kind="fault" live>{asApiError(claim.error).message}</Message> : null}
      {review.may.claim && !review.claimedByMe ? <p className="acts"><Button kind="first" busy={claim.isPending} onClick={() => claim.mutate()}>{claim.isPending ? 'Claiming' : 'Claim this case'}</Button></p> : null}
    </section>
  );
}
