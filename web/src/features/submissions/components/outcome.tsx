import { Link } from 'react-router-dom';
import type { Submission } from '#shared/contracts/submissions.ts';
import { ButtonLink } from '#web/components/button.tsx';
import { Message } from '#web/components/message.tsx';
import { When } from '#web/components/when.tsx';

const words = { accepted: 'Accepted', returned: 'Returned', declined: 'Declined' } as const;

/** What was decided, and the entry that came of it. */
export function Outcome({ submission: s }: { submission: Submission }) {
  const name = s.entry ? `${s.entry.accession}.${s.entry.version}` : '';
  const cancelled = s.history.findLast((h) => h.state === 'cancelled');
  return (
    <div className="flow outcome">
      {s.decision ? (
        <Message kind={s.decision.outcome === 'accepted' ? 'done' : 'note'} label={words[s.decision.outcome]}>
          <p className="preline">{s.decision.reason}</p>
          <p className="quiet">Decided <When at={s.decision.at} exact /></p>
        </Message>
      ) : null}
      {s.state === 'embargoed' && s.record.embargoUntil ? <Message kind="note">Closed until <span className="nowrap">{s.record.embargoUntil}</span>; then it is frozen and public by itself.</Message> : null}
      {s.entry && s.state !== 'embargoed' ? (
        <Message kind="done"><p>Frozen as <Link className="nowrap" to={`/entries/${s.entry.accession}/v/${s.entry.version}`}>{name}</Link>. It does not change any more; a mistake is answered by a new version or a withdrawal.</p></Message>
      ) : null}
      {s.state === 'cancelled' ? <Message kind="note"><p>Cancelled{cancelled?.by ? <> by {cancelled.by}</> : null}{cancelled ? <>, <When at={cancelled.at} exact /></> : null}. <ButtonLink kind="plain" to="/desk/submissions/new">Submit a dataset</ButtonLink></p></Message> : null}
    </div>
  );
}
