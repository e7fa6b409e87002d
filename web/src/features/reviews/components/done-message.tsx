import { Link } from 'react-router-dom';
import { stateWords, type SubmissionState } from '#shared/domain/life-cycle.ts';
import { Message } from '#web/components/message.tsx';
import type { Decided } from './decision-form.tsx';

/** Said after a decision, over the next case or the empty queue. */
export function DoneMessage({ decided }: { decided: Decided }) {
  const state = (stateWords[decided.state as SubmissionState] ?? decided.state).toLowerCase();
  const entry = decided.entry;
  return (
    <Message kind="done" live>
      <p>{decided.submission} is decided; its state is “{state}”.{entry ? <> It is <Link className="nowrap" to={`/entries/${entry.accession}/v/${entry.version}`}>{entry.accession}.{entry.version}</Link>.</> : null}</p>
    </Message>
  );
}
