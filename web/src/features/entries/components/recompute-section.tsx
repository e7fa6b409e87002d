import type { Entry } from '#shared/contracts/entries.ts';
import { Section } from '#web/components/section.tsx';

/** How anyone can make the same figures from the same file. */
export function RecomputeSection({ entry }: { entry: Entry }) {
  const seal = entry.links.seal ? ' --seal seal.json' : '';
  return (
    <Section title="Recompute" aside="No account needed." id="recompute">
      <div className="cols2">
        <div className="flow">
          <p className="prose">The estimate has no options and no starting point, and its random numbers follow from the content id. The same file gives the same figures, to the last digit, on any machine.</p>
          <p className="prose">{entry.links.seal ? 'Fetch the dataset and the seal above and run the command on a checkout of the project.' : 'Fetch the dataset above and run the command on a checkout of the project.'} Compare what it prints with the result file.</p>
        </div>
        <div className="flow">
          <p className="tbl">From a checkout of the project:</p>
          <pre className="cmd">{`npm run --silent estimate -- ${entry.provenance.fileName}${seal}`}</pre>
        </div>
      </div>
    </Section>
  );
}
