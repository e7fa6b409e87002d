import { zodResolver } from '@hookform/resolvers/zod';
import { useMutation, useQueryClient } from '@tanstack/react-query';
import { useMemo } from 'react';
import { useForm } from 'react-hook-form';
import type { Submission } from '#shared/contracts/submissions.ts';
import { formatDate } from '#shared/domain/format-date.ts';
import { Button } from '#web/components/button.tsx';
import { Ledger } from '#web/components/facts.tsx';
import { Message } from '#web/components/message.tsx';
import { TextArea, TextField } from '#web/components/text-field.tsx';
import { asApiError } from '#web/lib/api-error.ts';
import { saveRecord, submissionQuery } from '../api/submissions.ts';
import { lastEmbargoDay, recordFields, recordSchema } from '../record-schema.ts';

/** The record beside the file: filled in by the contributor, public with the entry. */
export function RecordForm({ submission }: { submission: Submission }) {
  const client = useQueryClient();
  const now = useMemo(() => new Date(), []);
  const { register, handleSubmit, reset, formState: { errors, isDirty } } = useForm({ resolver: zodResolver(recordSchema(now)), defaultValues: recordFields(submission.record) });
  const save = useMutation({
    mutationFn: (record: Submission['record']) => saveRecord(submission.id, record),
    onSuccess: (answer) => {
      client.setQueryData(submissionQuery(submission.id).queryKey, answer);
      reset(recordFields(answer.record));
    },
  });
  return (
    <form className="recordform" noValidate onSubmit={handleSubmit((record) => save.mutate(record))}>
      <TextField label="How the device was reached" hint="Such as “own device, laboratory access”" autoComplete="off" error={errors.access?.message} {...register('access')} />
      <TextArea label="Interests" rows={2} hint="Interests of the contributors in the provider; “none” is an answer" error={errors.interests?.message} {...register('interests')} />
      <TextField label="Embargo until" placeholder="year-month-day" inputMode="numeric" autoComplete="off" hint={`Leave empty for none; at the latest ${formatDate(`${lastEmbargoDay(now)}T00:00:00Z`)}`} error={errors.embargoUntil?.message} {...register('embargoUntil')} />
      <TextArea label="Notes" rows={3} hint="What a reader of the entry should know" error={errors.notes?.message} {...register('notes')} />
      {save.isError ? <Message kind="fault" live>{asApiError(save.error).message}</Message> : null}
      <p className="acts">
        <Button type="submit" busy={save.isPending}>{save.isPending ? 'Saving' : 'Save the record'}</Button>
        <span role="status" className="small quiet">{isDirty ? 'Not saved yet.' : save.isSuccess ? 'Saved.' : ''}</span>
      </p>
    </form>
  );
}

/** The record where it can no longer be changed. */
export function RecordLedger({ record }: Pick<Submission, 'record'>) {
  return (
    <Ledger items={[
      { term: 'How the device was reached', value: record.access ?? 'not filled in' },
      { term: 'Interests', value: record.interests ?? 'not filled in' },
      { term: 'Embargo until', value: record.embargoUntil ?? 'none' },
      { term: 'Notes', value: record.notes ?? 'none' },
    ]} />
  );
}
