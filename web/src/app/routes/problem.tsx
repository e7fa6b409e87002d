import { Link, useParams } from 'react-router-dom';
import { errorCodes, isErrorCode } from '#shared/errors/codes.ts';
import { Facts } from '#web/components/facts.tsx';
import { PageHead } from '#web/components/page-head.tsx';
import { Section } from '#web/components/section.tsx';
import { Wrap } from '#web/components/wrap.tsx';

/** The help page that the `type` of every problem answer points to. */
export function Component() {
  const code = useParams().code ?? '';
  if (!isErrorCode(code)) return <Wrap><PageHead title="No such problem" opening={<>The registry knows no problem called <code>{code}</code>.</>}><ProblemList /></PageHead></Wrap>;
  const { title, status, help } = errorCodes[code];
  return (
    <Wrap>
      <PageHead above="Problem" title={title}>
        <Facts items={[{ term: 'Code', value: <code>{code}</code> }, { term: 'HTTP status', value: String(status) }]} />
      </PageHead>
      <Section title="What it means"><p className="prose">{help}</p></Section>
      <Section title="All problems" aside="The set is closed: every answer that refuses something carries one of these."><ProblemList /></Section>
    </Wrap>
  );
}

function ProblemList() {
  return <ul className="plainlist">{Object.entries(errorCodes).map(([code, { title }]) => <li key={code}><Link to={`/problems/${code}`}>{title}</Link> <code className="quiet">{code}</code></li>)}</ul>;
}
