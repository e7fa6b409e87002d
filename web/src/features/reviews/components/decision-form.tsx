import { zodResolver } from '@hookform/resolvers/zod';
import { useMutation, useQueryClient } from '@tanstack/react-query';
import { useForm, useWatch } from 'react-hook-form';
import type { Review, ReviewDecision } from '#shared/contracts/reviews.ts';
import { Button } from '#web/components/button.tsx';
import { Checkbox, Group, Radio } from '#web/components/check.tsx';
import { Message } from '#web/components/message.tsx';
import { TextArea } from '#web/components/text-field.tsx';
import { asApiError } from '#web/lib/api-error.ts';
import { decideReview, releaseReview, reviewQuery, reviewQueueQuery } from '../api/reviews.ts';
import { decisionSchema, decisionWords, outcomes, type Outcome } from '../decision-schema.ts';

export type Decided = Awaited<ReturnType<typeof decideReview>>;

/** The decision on a case that this curator has claimed. */
export function DecisionForm({ review, onDecided }: { review: Review; onDecided: (decided: Decided) => void }) {
  const { id, organisation, record } = review.submission;
  const client = useQueryClient();
  const { register, handleSubmit, control, formState: { errors } } = useForm<ReviewDecision>({ resolver: zodResolver(decisionSchema), defaultValues: { reason: '' } });
  // Nothing is chosen at first, whatever the type of the finished decision says.
  const outcome: Outcome | undefined = useWatch({ control, name: 'outcome' });
  const words = decisionWords(outcome ?? '', record.embargoUntil);
  const decide = useMutation({
    mutationFn: (decision: ReviewDecision) => decideReview(id, decision),
    onSuccess: async (decided) => {
      onDecided(decided);
      await client.invalidateQueries({ queryKey: reviewQueueQuery().queryKey });
    },
  });
  const release = useMutation({ mutationFn: () => releaseReview(id), onSuccess: (answer) => { client.setQueryData(reviewQuery(id).queryKey, answer); void client.invalidateQueries({ queryKey: reviewQueueQuery().queryKey }); } });
  const failed = decide.error ?? release.error;
  return (
    <form className="decide" aria-labelledby="decision" noValidate onSubmit={handleSubmit((decision) => decide.mutate(decision))}>
      <h2 id="decision">Decision</h2>
      <Group legend="What do you decide?" error={errors.outcome?.message ?? null}>
        {outcomes.map((o) => <Radio key={o.value} value={o.value} label={<><b>{o.title}</b><span className="sub">{o.hint}</span></>} {...register('outcome')} />)}
      </Group>
      <TextArea label="Reason" rows={5} hint={words.reasonHint} error={errors.reason?.message} {...register('reason')} />
      <Checkbox label={<>I have no tie to {organisation.name}, now or in the last 12 months.</>} error={errors.noInterest?.message} {...register('noInterest')} />
      {failed ? <Message kind="fault" live>{asApiError(failed).message}</Message> : null}
      <p className="acts">
        <Button type="submit" kind="first" busy={decide.isPending}>{decide.isPending ? 'Deciding' : words.action}</Button>
        <Button kind="plain" busy={release.isPending} onClick={() => release.mutate()}>Release the claim</Button>
      </p>
      {words.warning ? <p className="small quiet">{words.warning}</p> : null}
    </form>
  );
}
