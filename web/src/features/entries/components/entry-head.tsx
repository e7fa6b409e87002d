import { Link } from 'react-router-dom';
import type { Entry } from '#shared/contracts/entries.ts';
import { formatDate, formatSpan } from '#shared/domain/format-date.ts';
import { plural } from '#shared/domain/format.ts';
import { joinWords } from '#shared/domain/format.ts';
import { versionedAccessionOf } from '#shared/domain/ids.ts';
import { Facts } from '#web/components/facts.tsx';
import { PageTitle } from '#web/components/page-title.tsx';
import { useOwnSelection } from '#web/lib/own-selection.ts';
import { headlineOf } from '../entry-words.ts';

const stateSentence: Readonly<Record<Entry['state'], string>> = {
  frozen: 'Frozen. This version will not change.',
  superseded: 'Superseded by a newer version. This version will not change.',
  withdrawn: 'Withdrawn. The page stays; the data is not handed out.',
};

/** Title, headline sentence, facts, and the seal with the state of this version. */
export function EntryHead({ entry }: { entry: Entry }) {
  const own = useOwnSelection();
  const mine = own.has(entry.accession);
  const name = versionedAccessionOf(entry.accession, entry.version);
  const headline = headlineOf(entry);
  return (
    <div className="head entryhead">
      <PageTitle>{`${entry.device.name}, ${name}`}</PageTitle>
      <div>
        <p className="above"><Link to={`/boards/${entry.class.id}`}>{entry.gateClassTitle}</Link>, entry {entry.accession}, version {entry.version} of {entry.versions.length}</p>
        <h1 className="devicename">{entry.device.name}</h1>
        <p className="opening">{headline ? <>{headline.before}<b>{headline.value}</b>{headline.after}</> : <>No headline figure: {entry.headline?.reason ?? 'retained signal is not determined here'}</>}</p>
        <Facts items={[
          { term: 'Provider', value: <Link to={`/find?q=${encodeURIComponent(entry.device.provider.name)}`}>{entry.device.provider.name}</Link> },
          { term: 'Device', value: <Link to={`/devices/${encodeURIComponent(entry.device.id)}`}>{entry.device.name}</Link> },
          { term: 'Register', value: `${plural(entry.register.length, 'qubit')} ${joinWords(entry.register)}` },
          { term: 'Circuits run', value: formatSpan(entry.provenance.startedAt, entry.provenance.endedAt) },
          { term: 'Frozen', value: formatDate(entry.frozenAt) },
          { term: 'Method', value: <Link to="/method">{entry.method}</Link> },
        ]} />
      </div>
      <aside className="seal" aria-label="State of this entry">
        <p className="acc nowrap">{name}</p>
        <p>{stateSentence[entry.state]}</p>
        <p><a href="#recompute">Recompute</a> <a href="#files">Download</a></p>
        <p className="noprint"><button type="button" className={mine ? 'btn own' : 'btn'} aria-pressed={mine} onClick={() => own.toggle({ accession: entry.accession, name: entry.device.name })}>{mine ? 'Marked as yours' : 'Mark as yours'}</button></p>
      </aside>
    </div>
  );
}
