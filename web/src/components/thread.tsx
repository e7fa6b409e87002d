import { zodResolver } from '@hookform/resolvers/zod';
import { useForm } from 'react-hook-form';
import { messageCreate, type Message as ThreadMessage } from '#shared/contracts/submissions.ts';
import { asApiError } from '#web/lib/api-error.ts';
import { Button } from './button.tsx';
import { Message } from './message.tsx';
import { TextArea } from './text-field.tsx';
import { When } from './when.tsx';

const roles: Readonly<Record<ThreadMessage['role'], string>> = { contributor: 'contributor', curator: 'curator', registry: 'the registry' };

/** What contributors, curators and the registry wrote about a submission, oldest first. */
export function Thread({ messages }: { messages: readonly ThreadMessage[] }) {
  if (messages.length === 0) return <p className="says quiet">Nothing written yet.</p>;
  return (
    <ol className="thread">
      {messages.map((m) => (
        <li key={m.id}>
          <p className="by"><b>{m.author}</b>, {m.organisation ?? roles[m.role]}, <When at={m.at} exact /></p>
          {m.body.split(/\n{2,}/).map((paragraph, i) => <p key={i} className="preline">{paragraph}</p>)}
        </li>
      ))}
    </ol>
  );
}

/** Adds to a thread. The text stays in the field until the registry has it. */
export function ThreadForm({ onWrite }: { onWrite: (body: string) => Promise<unknown> }) {
  const { register, handleSubmit, reset, setError, formState: { errors, isSubmitting } } = useForm({ resolver: zodResolver(messageCreate), defaultValues: { body: '' } });
  const write = handleSubmit(async ({ body }) => {
    try {
      await onWrite(body);
      reset();
    } catch (error) {
      setError('root', { message: asApiError(error).message });
    }
  });
  return (
    <form className="say" noValidate onSubmit={(event) => void write(event)}>
      <TextArea label="Write to the thread" rows={3} hint="Kept with the submission. Made public with the entry if it is accepted." error={errors.body?.message} {...register('body')} />
      {errors.root ? <Message kind="fault" live>{errors.root.message}</Message> : null}
      <p><Button type="submit" busy={isSubmitting}>{isSubmitting ? 'Adding' : 'Add'}</Button></p>
    </form>
  );
}
