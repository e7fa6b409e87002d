import { useMutation, useQueryClient } from '@tanstack/react-query';
import { useEffect, useRef, useState } from 'react';
import { formatCount, plural } from '#shared/domain/format.ts';
import { Button } from '#web/components/button.tsx';
import { Message } from '#web/components/message.tsx';
import { Section } from '#web/components/section.tsx';
import { asApiError } from '#web/lib/api-error.ts';
import { checkLog, type Finding, type LogReport } from '../check-log.ts';
import { keepSeenHead, readSeenHead } from '../last-seen.ts';

const words: Readonly<Record<Finding, string>> = { agrees: 'Agrees', disagrees: 'Does not agree', 'not-checked': 'Not checked' };

function Report({ report }: { report: LogReport }) {
  return (
    <>
      <Message kind={report.sound ? 'done' : 'fault'} live>
        {report.sound ? `The log of ${formatCount(report.head.treeSize)} ${plural(report.head.treeSize, 'leaf', 'leaves')} is what its head says.` : 'The log does not agree with its head. Please keep this page and tell the stewards of the registry.'}
      </Message>
      <table className="tight stack">
        <caption className="unseen">What was checked in this browser</caption>
        <thead><tr><th scope="col">Check</th><th scope="col">Finding</th><th scope="col">Detail</th></tr></thead>
        <tbody>
          {report.checks.map((c) => <tr key={c.name}><th scope="row">{c.name}</th><td data-label="Finding">{words[c.finding]}</td><td data-label="Detail">{c.detail}</td></tr>)}
        </tbody>
      </table>
    </>
  );
}

/** The reader's own browser builds the tree again, and remembers the head for the next time. */
export function CheckSection() {
  const client = useQueryClient();
  const stop = useRef<AbortController | null>(null);
  const [done, setDone] = useState('');
  useEffect(() => () => stop.current?.abort(), []);
  const check = useMutation({
    mutationFn: async () => {
      stop.current = new AbortController();
      const report = await checkLog(readSeenHead(), (leaves, of) => setDone(`${formatCount(leaves)} of ${formatCount(of)} leaves`), stop.current.signal);
      if (report.sound) keepSeenHead({ treeSize: report.head.treeSize, rootHash: report.head.rootHash, keyId: report.head.keyId, seenAt: new Date().toISOString() });
      return report;
    },
    onSuccess: () => client.invalidateQueries({ queryKey: ['log'] }),
  });
  return (
    <Section title="Check it here" aside="In this browser." id="check">
      <div className="flow">
        <p className="prose">Your browser fetches every leaf, builds the tree again, compares its root with the signed head, and sees whether the log still begins with the log it saw last time. Nothing is sent.</p>
        <p><Button kind="first" busy={check.isPending} onClick={() => check.mutate()}>{check.isPending ? 'Checking' : 'Check the log'}</Button> {check.isPending ? <span className="quiet">{done}</span> : null}</p>
        {check.isError ? <Message kind="fault" live>{`The log could not be checked. ${asApiError(check.error).message}`}</Message> : null}
        {check.data ? <Report report={check.data} /> : null}
      </div>
    </Section>
  );
}
