import { Link } from 'react-router-dom';
import { FaultTable } from '#web/components/fault-table.tsx';
import { Message } from '#web/components/message.tsx';
import { asApiError } from '#web/lib/api-error.ts';

const twin = /\b(S-\d{6,9}|EVB-\d{6,9})\b/;

/** Why the registry did not take a file: its sentence, its pointers, and the twin where the same data is there already. */
export function UploadFault({ error, name }: { error: unknown; name: string }) {
  if (error instanceof DOMException && error.name === 'AbortError') return <Message kind="note" live>The upload was stopped. Nothing of it was kept.</Message>;
  const fault = asApiError(error);
  const other = fault.code === 'duplicate-content' ? twin.exec(fault.message)?.[1] : undefined;
  return (
    <>
      <Message kind="fault" live>
        <p><b>{fault.title}.</b> {fault.message}</p>
        {other ? <p><Link to={other.startsWith('S-') ? `/desk/submissions/${other}` : `/entries/${other}`}>Open {other}</Link></p> : null}
        {fault.fault === 'offline' || fault.status >= 500 ? <p>Trying again is safe: this file can make only one submission.</p> : null}
      </Message>
      {fault.fields.length > 0 ? <FaultTable name={name} faults={fault.fields} /> : null}
    </>
  );
}
