import type { Submission } from '#shared/contracts/submissions.ts';
import { capitalise, countInWords, plural } from '#shared/domain/format.ts';

type Sendable = Pick<Submission, 'state' | 'checks' | 'record' | 'recordComplete' | 'may'>;

/**
 * Why "Send to review" is closed, in one sentence; null = it is open.
 * The server decides (`may.send`); the sentence only explains.
 */
export const closedReason = ({ state, checks, record, recordComplete, may }: Sendable): string | null => {
  if (state === 'ready' && recordComplete && may.send) return null;
  const ahead = checks.filter((c) => c.status === 'waiting' || c.status === 'running').length;
  const failed = checks.filter((c) => c.status === 'failed' && c.blocking);
  switch (state) {
    case 'draft':
    case 'checking': return ahead === 0 ? 'The checks have not begun.' : `${capitalise(countInWords(ahead))} ${plural(ahead, 'check is', 'checks are')} still to come.`;
    case 'blocked': return failed.length === 0 ? 'A check failed; send a new file.' : `${capitalise(countInWords(failed.length))} ${plural(failed.length, 'check')} failed: ${failed.map((c) => c.title).join('; ')}. Send a new file.`;
    case 'returned': return 'The curator returned it: replace the file or mend the record first.';
    case 'ready': return recordComplete ? 'Only a contributor of the organisation may send it.' : `Fill in ${missing(record).join(' and ')} first.`;
    case 'in-review': return 'It lies with a curator.';
    default: return 'This submission is closed.';
  }
};

const missing = (record: Submission['record']): string[] =>
  [record.access ? null : 'how the device was reached', record.interests ? null : 'the interests'].filter((words) => words !== null);
