import type { Submission } from '#shared/contracts/submissions.ts';
import { formatCount } from '#shared/domain/format.ts';
import { PreviewFigures } from '#web/charts/figure-beams.tsx';
import { Message } from '#web/components/message.tsx';
import { Section } from '#web/components/section.tsx';
import { figureRows } from '#web/lib/figure-rows.ts';

interface Props {
  result: NonNullable<Submission['result']>;
  submission: Submission;
  /** Is the entry public already? */
  open: boolean;
}

/** The figures as they will be published, each on an axis of its own. */
export function PreviewSection({ result, submission, open }: Props) {
  return (
    <Section title={open ? 'Figures' : 'Preview'} aside={open ? 'As frozen.' : 'Only your organisation and the curator see this.'} notes={
      <p><strong>Reading them.</strong> The thin line is the 95{'\u202f'}% interval, the bar 80{'\u202f'}%, the block 50{'\u202f'}%. What the gate set cannot determine is named, with the reason.</p>
    }>
      <div className="flow">
        {result.warnings.length > 0 ? <Message kind="caution">{result.warnings.map((w) => <p key={w}>{w}</p>)}</Message> : null}
        <PreviewFigures caption="Figures" quiet={`by method ${result.method}, from ${formatCount(result.replicates)} replicates`} rows={figureRows(result.figures, submission)} />
        <p className="says after">Each figure has an axis of its own here.{open ? '' : ' Nothing on this page is public, and nothing is ranked, until a curator accepts it.'}</p>
      </div>
    </Section>
  );
}
