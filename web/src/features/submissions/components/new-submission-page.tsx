import { Link } from 'react-router-dom';
import { PageHead } from '#web/components/page-head.tsx';
import { Section } from '#web/components/section.tsx';
import { Wrap } from '#web/components/wrap.tsx';
import { DatasetSender } from './dataset-sender.tsx';

export function NewSubmissionPage({ organisation }: { organisation: { id: string; name: string } }) {
  return (
    <Wrap>
      <PageHead slim above={<Link to="/desk/submissions">Submissions</Link>} title="Submit a dataset" />
      <Section title="The file" aside={`For ${organisation.name}`} notes={<>
        <p><strong>What happens next.</strong> The registry checks the file and estimates it; that takes seconds for one qubit and minutes for registers. Then you fill in the record and send it to review.</p>
        <p><strong>The format.</strong> One JSON file with the counts of every circuit. The <Link to="/schema">schema</Link> has worked examples.</p>
      </>}>
        <DatasetSender key={organisation.id} target={{ kind: 'new', organisation: organisation.id }} action="Submit this dataset" />
      </Section>
    </Wrap>
  );
}
