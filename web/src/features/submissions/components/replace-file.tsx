import { useState } from 'react';
import type { Submission } from '#shared/contracts/submissions.ts';
import { Button } from '#web/components/button.tsx';
import { DatasetSender } from './dataset-sender.tsx';

/** A new file for the same submission: the checks begin again, the thread and the record stay. */
export function ReplaceFile({ submission }: { submission: Submission }) {
  const [open, setOpen] = useState(submission.state === 'blocked');
  if (!open) return <p className="acts after"><Button onClick={() => setOpen(true)}>Replace the file</Button></p>;
  return (
    <div className="flow replace">
      <h3>Replace the file</h3>
      <p className="says">The checks and the estimate begin again. Record and thread stay.</p>
      <DatasetSender key={submission.round} target={{ kind: 'replace', submission: submission.id }} action="Send the new file" />
      {submission.state === 'blocked' ? null : <p><Button kind="plain" onClick={() => setOpen(false)}>Keep the present file</Button></p>}
    </div>
  );
}
