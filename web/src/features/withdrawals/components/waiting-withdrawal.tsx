import { useMutation, useQueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import type { Withdrawal } from '#shared/contracts/withdrawals.ts';
import { versionedAccessionOf } from '#shared/domain/ids.ts';
import { formatDate } from '#shared/domain/format-date.ts';
import { AccessionLink } from '#web/components/accession-link.tsx';
import { Button } from '#web/components/button.tsx';
import { Checkbox } from '#web/components/check.tsx';
import { Message } from '#web/components/message.tsx';
import { TextField } from '#web/components/text-field.tsx';
import { asApiError } from '#web/lib/api-error.ts';
import { answerWithdrawal, withdrawalsQuery } from '../api/withdrawals.ts';

/** One withdrawal that waits: what is asked, and the second curator's answer. */
export function WaitingWithdrawal({ asked }: { asked: Withdrawal }) {
  const client = useQueryClient();
  const [noInterest, setNoInterest] = useState(false);
  const [note, setNote] = useState('');
  const [told, setTold] = useState<{ noInterest?: string; note?: string }>({});
  const answer = useMutation({
    mutationFn: (given: Parameters<typeof answerWithdrawal>[1]) => answerWithdrawal(asked.id, given),
    onSuccess: () => client.invalidateQueries({ queryKey: withdrawalsQuery().queryKey }),
  });
  const name = versionedAccessionOf(asked.accession, asked.version);
  const confirm = (): void => (noInterest ? (setTold({}), answer.mutate({ answer: 'confirm', noInterest: true })) : setTold({ noInterest: 'Declare that you have no tie to the organisation.' }));
  const drop = (): void => (note.trim() ? (setTold({}), answer.mutate({ answer: 'drop', note })) : setTold({ note: 'Say why it is dropped.' }));
  return (
    <article className="recordform waiting" aria-label={`Withdrawal of ${name}`}>
      <h3><AccessionLink accession={asked.accession} version={asked.version} /> {asked.title}</h3>
      <p className="small quiet">{asked.organisation}. Asked by {asked.askedBy} on {formatDate(asked.askedAt)}.</p>
      <blockquote className="prose">{asked.reason}</blockquote>
      {asked.may.confirm ? (
        <>
          <Checkbox label={`I have no tie to ${asked.organisation}, now or in the last 12 months.`} checked={noInterest} onChange={(event) => setNoInterest(event.target.checked)} error={told.noInterest} />
          <p><Button kind="force" busy={answer.isPending} onClick={confirm}>Withdraw {name}</Button></p>
          <p className="small quiet">This cannot be taken back. The page, the result and the proof stay; the dataset is no longer handed out.</p>
        </>
      ) : <p className="small">{asked.may.drop ? 'You asked for it. Another curator must confirm it.' : 'You cannot answer for this one.'}</p>}
      {asked.may.drop ? (
        <details>
          <summary>Drop it instead</summary>
          <TextField label="Why it is dropped" value={note} onChange={(event) => setNote(event.target.value)} error={told.note} />
          <p><Button busy={answer.isPending} onClick={drop}>Drop the request</Button></p>
        </details>
      ) : null}
      {answer.isError ? <Message kind="fault" live>{asApiError(answer.error).message}</Message> : null}
    </article>
  );
}
