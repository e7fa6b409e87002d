import type { Entry } from '#shared/contracts/entries.ts';
import { Section } from '#web/components/section.tsx';
import { RecomputeRun } from './recompute-run.tsx';

/** About how long it takes, as measured in Chromium on two cores. */
const lasts = (qubits: number): string => (qubits === 1 ? 'It takes a few seconds.' : 'It takes up to a minute and some hundred megabytes of memory.');

/** How anyone can make the same figures from the same file: in this browser, or by a command. */
export function RecomputeSection({ entry }: { entry: Entry }) {
  const withdrawn = entry.state === 'withdrawn';
  const seal = entry.links.seal ? ' --seal seal.json' : '';
  const intro = (
    <p className="prose">{withdrawn
      ? 'This version was withdrawn. Its data is not handed out, so that its figures cannot be made again; the command checks what is left: hashes and log proof.'
      : `Your browser can run the same method on the same file and compare every figure, interval and digest with what was frozen. ${lasts(entry.register.length)} The estimate has no options, and its random numbers follow from the content id.`}</p>
  );
  const commands = (
    <>
      <p className="tbl">From a checkout of the project, every check at once:</p>
      <pre className="cmd">{`npm run --silent verify -- \\\n  ${window.location.origin}${entry.links.page}`}</pre>
      {withdrawn ? null : <p className="tbl">The estimate alone, from the downloaded files:</p>}
      {withdrawn ? null : <pre className="cmd">{`npm run --silent estimate -- \\\n  ${entry.provenance.fileName}${seal}`}</pre>}
    </>
  );
  return (
    <Section title="Recompute" aside="No account needed." id="recompute">
      {withdrawn ? <div className="cols2"><div className="flow">{intro}</div><div className="flow">{commands}</div></div> : <RecomputeRun key={entry.links.page} entry={entry} intro={intro} commands={commands} />}
    </Section>
  );
}
