import { useQuery, useQueryClient } from '@tanstack/react-query';
import { Link } from 'react-router-dom';
import type { Submission } from '#shared/contracts/submissions.ts';
import { BlankState } from '#web/components/blank-state.tsx';
import { CheckList } from '#web/components/check-list.tsx';
import { LifeLine } from '#web/components/life-line.tsx';
import { PageHead } from '#web/components/page-head.tsx';
import { Read } from '#web/components/read.tsx';
import { Section } from '#web/components/section.tsx';
import { Thread, ThreadForm } from '#web/components/thread.tsx';
import { When } from '#web/components/when.tsx';
import { Wrap } from '#web/components/wrap.tsx';
import { isChecking, submissionQuery, writeMessage } from '../api/submissions.ts';
import { lifeTrack } from '../life-track.ts';
import { Outcome } from './outcome.tsx';
import { PreviewSection } from './preview-section.tsx';
import { ProgressSection } from './progress-section.tsx';
import { RecordForm, RecordLedger } from './record-form.tsx';
import { ReplaceFile } from './replace-file.tsx';
import { SendRow } from './send-row.tsx';
import { SubmissionFacts } from './submission-facts.tsx';

/** One submission from its draft to its entry. */
export function SubmissionPage({ id }: { id: string }) {
  const submission = useQuery(submissionQuery(id));
  const above = <><Link to="/desk/submissions">Submissions</Link>, {id}</>;
  if (submission.data) return <Wrap><Body submission={submission.data} above={above} /></Wrap>;
  return (
    <Wrap>
      <PageHead slim above={above} title={id} />
      <Read level={2} query={submission} what="This submission" loading={`Loading ${id}`} rows={6}
        missing={<BlankState level={2} title="There is no such submission"><p>No submission has the number {id}.</p></BlankState>}>
        {() => null}
      </Read>
    </Wrap>
  );
}

function Body({ submission: s, above }: { submission: Submission; above: React.ReactNode }) {
  const client = useQueryClient();
  const write = async (body: string): Promise<void> => {
    await writeMessage(s.id, body);
    await client.invalidateQueries({ queryKey: submissionQuery(s.id).queryKey });
  };
  return (
    <>
      <PageHead slim above={above} title={s.title}><SubmissionFacts submission={s} /></PageHead>
      <LifeLine label="Life of this submission" stages={lifeTrack(s).map(({ title, at, hint, place }) => ({ name: title, when: place, note: at ? <When at={at} exact /> : hint }))} />
      <Outcome submission={s} />
      {isChecking(s) ? <ProgressSection submission={s} /> : null}
      <Section title="Checks" aside="Each is the same for every provider.">
        {s.checks.length === 0 ? <p className="says quiet">The checks have not begun.</p> : <CheckList checks={s.checks} />}
        {s.may.replace ? <ReplaceFile submission={s} /> : null}
      </Section>
      {s.result ? <PreviewSection result={s.result} submission={s} open={s.entry !== null && s.state !== 'embargoed'} /> : null}
      <Section title="Record" aside="Public with the entry." notes={s.may.edit ? <>
        <p><strong>What is asked.</strong> How the device was reached and the contributors’ interests are wanted before a review; the rest may stay empty.</p>
        <p><strong>Embargo.</strong> You may name a date, at most 180 days ahead, before which an accepted entry stays closed.</p>
      </> : undefined}>
        {s.may.edit ? <RecordForm submission={s} /> : <RecordLedger record={s.record} />}
      </Section>
      <Section title="Thread" aside="You, your organisation and the curator.">
        <Thread messages={s.messages} />
        {s.may.message ? <ThreadForm onWrite={write} /> : null}
      </Section>
      <SendRow submission={s} />
    </>
  );
}
