import { zodResolver } from '@hookform/resolvers/zod';
import { useMutation, useQueryClient } from '@tanstack/react-query';
import { useForm } from 'react-hook-form';
import { z } from 'zod';
import type { TokenCreated } from '#shared/contracts/session.ts';
import { Button } from '#web/components/button.tsx';
import { Message } from '#web/components/message.tsx';
import { TextField } from '#web/components/text-field.tsx';
import { asApiError } from '#web/lib/api-error.ts';
import { createToken, tokensQuery } from '../api/tokens.ts';

const fields = z.object({ name: z.string().trim().min(1, 'Name the token after what will use it.').max(80, 'A token name has at most 80 characters.') });

export function NewToken({ organisation, onCreated }: { organisation: string; onCreated: (token: TokenCreated) => void }) {
  const client = useQueryClient();
  const { register, handleSubmit, reset, formState: { errors } } = useForm({ resolver: zodResolver(fields), defaultValues: { name: '' } });
  const create = useMutation({
    mutationFn: createToken,
    onSuccess: async (token) => {
      reset();
      onCreated(token);
      await client.invalidateQueries({ queryKey: tokensQuery(organisation).queryKey });
    },
  });
  return (
    <form className="say" noValidate onSubmit={handleSubmit(({ name }) => create.mutate({ name, organisation }))}>
      <TextField label="What will use it" hint="For your own list, such as “cryostat pipeline”" autoComplete="off" error={errors.name?.message} {...register('name')} />
      {create.isError ? <Message kind="fault" live>{asApiError(create.error).message}</Message> : null}
      <p className="acts"><Button type="submit" kind="first" busy={create.isPending}>{create.isPending ? 'Making it' : 'Make a token'}</Button></p>
    </form>
  );
}
