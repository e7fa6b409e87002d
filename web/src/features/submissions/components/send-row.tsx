import { useMutation, useQueryClient } from '@tanstack/react-query';
import { useId } from 'react';
import type { Submission } from '#shared/contracts/submissions.ts';
import { Button } from '#web/components/button.tsx';
import { Confirm } from '#web/components/confirm.tsx';
import { Message } from '#web/components/message.tsx';
import { asApiError } from '#web/lib/api-error.ts';
import { cancelSubmission, sendToReview, submissionQuery } from '../api/submissions.ts';
import { closedReason } from '../send-gate.ts';

/** The last row of a submission: to review, or closed with the reason; and the way out. */
export function SendRow({ submission: s }: { submission: Submission }) {
  const client = useQueryClient();
  const why = useId();
  const keep = (answer: Submission): void => { client.setQueryData(submissionQuery(s.id).queryKey, answer); void client.invalidateQueries({ queryKey: ['submissions'] }); };
  const send = useMutation({ mutationFn: () => sendToReview(s.id), onSuccess: keep });
  const cancel = useMutation({ mutationFn: () => cancelSubmission(s.id), onSuccess: keep });
  const closed = closedReason(s);
  const wanted = s.state !== 'in-review' && (s.may.send || s.may.edit);
  const failed = send.error ?? cancel.error;
  if (!wanted && !s.may.cancel) return null;
  return (
    <section className="sendrow" aria-label="Send or cancel">
      {wanted ? (
        <>
          <Button kind="first" disabled={closed !== null} aria-describedby={why} busy={send.isPending} onClick={() => send.mutate()}>{send.isPending ? 'Sending' : 'Send to review'}</Button>
          <p id={why} className="small quiet">{closed ?? 'A curator of another organisation reads it. Until the decision nothing can be changed.'}</p>
        </>
      ) : null}
      {s.may.cancel ? (
        <div className="cancelrow">
          <Confirm ask="Cancel this submission" act="Yes, cancel it" busy={cancel.isPending} onConfirm={() => cancel.mutate()}>
            The submission is closed and cannot be taken up again. The run sheet and the data stay yours; you may submit them anew.
          </Confirm>
        </div>
      ) : null}
      {failed ? <Message kind="fault" live>{asApiError(failed).message}</Message> : null}
    </section>
  );
}
