import { Link } from 'react-router-dom';
import type { Entry } from '#shared/contracts/entries.ts';
import { formatDate } from '#shared/domain/format-date.ts';
import { joinWords } from '#shared/domain/format.ts';
import { AccessionLink } from '#web/components/accession-link.tsx';
import { DemoNote } from '#web/components/demo.tsx';
import { Message } from '#web/components/message.tsx';

/** What a reader must know before the figures: demonstration, newer version, withdrawal, warnings, why not listed. */
export function EntryNotices({ entry }: { entry: Entry }) {
  const newest = entry.versions.reduce((a, b) => (b.version > a.version ? b : a), { version: entry.version, state: entry.state });
  return (
    <div className="notices">
      {entry.demo ? <DemoNote /> : null}
      {newest.version > entry.version ? <Message kind="note"><p>This entry has a newer version, <AccessionLink accession={entry.accession} version={newest.version} />. You are reading version {entry.version}.</p></Message> : null}
      {entry.state === 'withdrawn' ? (
        <Message kind="fault" label="Withdrawn">
          {entry.withdrawal ? <p>Withdrawn on {formatDate(entry.withdrawal.at)} by two curators, {joinWords(entry.withdrawal.decidedBy)}: “{entry.withdrawal.reason}”</p> : null}
          <p>Do not rely on its figures; they are shown only so that earlier citations can be understood. The data is no longer handed out. The <a href={`/api/v1/entries/${entry.accession}/v/${entry.version}/proof?event=withdrawn`}>proof of the withdrawal</a> is in the log.</p>
        </Message>
      ) : null}
      {entry.warnings.map((warning) => <Message key={warning} kind="caution" label="Warning">{warning}</Message>)}
      {entry.eligibility.length > 0 ? (
        <Message kind="note" label="Not listed">
          <p>This entry is public and can be cited, but does not stand on <Link to={`/boards/${entry.class.id}`}>its board</Link>.</p>
          {entry.eligibility.map((reason) => <p key={reason.code}>{reason.sentence} <span className="quiet">What would change it: {reason.remedy}</span></p>)}
        </Message>
      ) : null}
    </div>
  );
}
