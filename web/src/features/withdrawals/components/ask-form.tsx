import { zodResolver } from '@hookform/resolvers/zod';
import { useMutation, useQueryClient } from '@tanstack/react-query';
import { useForm } from 'react-hook-form';
import { readVersionedAccession } from '#shared/domain/ids.ts';
import { Button } from '#web/components/button.tsx';
import { Checkbox } from '#web/components/check.tsx';
import { Message } from '#web/components/message.tsx';
import { TextArea, TextField } from '#web/components/text-field.tsx';
import { asApiError } from '#web/lib/api-error.ts';
import { askWithdrawal, withdrawalsQuery } from '../api/withdrawals.ts';
import { askedSchema, type AskedFields } from '../asked-schema.ts';

/** The first curator's part. Nothing happens to the entry before another one confirms. */
export function AskForm({ entry }: { entry: string }) {
  const client = useQueryClient();
  const { register, handleSubmit, reset, formState: { errors } } = useForm<AskedFields>({ resolver: zodResolver(askedSchema), defaultValues: { entry, reason: '' } });
  const ask = useMutation({
    mutationFn: ({ entry: name, ...asked }: AskedFields) => askWithdrawal(readVersionedAccession(name)!, asked),
    onSuccess: async () => {
      reset({ entry: '', reason: '' });
      await client.invalidateQueries({ queryKey: withdrawalsQuery().queryKey });
    },
  });
  return (
    <form className="recordform" noValidate onSubmit={handleSubmit((fields) => ask.mutate(fields))}>
      <TextField label="Version" hint="As on its page: EVB-000042.1" autoComplete="off" error={errors.entry?.message} {...register('entry')} />
      <TextArea label="Reason" rows={4} hint="Public for ever on the entry’s page" error={errors.reason?.message} {...register('reason')} />
      <Checkbox label="I have no tie to its organisation, now or in the last 12 months." error={errors.noInterest?.message} {...register('noInterest')} />
      {ask.isError ? <Message kind="fault" live>{asApiError(ask.error).message}</Message> : null}
      {ask.isSuccess ? <Message kind="done" live>{`The withdrawal of ${ask.data.accession}.${ask.data.version} waits for a second curator. The others have been written to.`}</Message> : null}
      <p><Button type="submit" kind="first" busy={ask.isPending}>{ask.isPending ? 'Asking' : 'Ask for the withdrawal'}</Button></p>
    </form>
  );
}
