import type { Submission } from '#shared/contracts/submissions.ts';
import { Progress } from '#web/components/progress.tsx';
import { Section } from '#web/components/section.tsx';
import { VisuallyHidden } from '#web/components/visually-hidden.tsx';
import { announcement, progressWords } from '../progress-words.ts';

/** The estimate while it runs. The eye sees every step, the ear only the larger ones. */
export function ProgressSection({ submission }: { submission: Submission }) {
  return (
    <Section title={submission.state === 'accepted' ? 'Freezing' : 'Estimating'}>
      <p className="opening mid" aria-hidden="true">{progressWords(submission)} You may leave this page; we will write when it is done.</p>
      <p role="status" className="unseen">{announcement(submission)}</p>
      <VisuallyHidden>You may leave this page; the registry will write when it is done.</VisuallyHidden>
      <Progress value={submission.progress} label="Checks and estimate" />
    </Section>
  );
}
