import type { Review } from '#shared/contracts/reviews.ts';
import { formatBytes, formatCount } from '#shared/domain/format.ts';
import { Facts } from '#web/components/facts.tsx';
import { PageTitle } from '#web/components/page-title.tsx';
import { When } from '#web/components/when.tsx';
import { openingWords } from '../opening-words.ts';
import { roundWords } from '../queue-words.ts';

export function CaseHead({ review }: { review: Review }) {
  const s = review.submission;
  const sent = s.history.findLast((h) => h.state === 'in-review');
  return (
    <div className="casehead">
      <PageTitle>{`Review ${s.id}`}</PageTitle>
      <p className="above">{s.id}{sent ? <>, sent <When at={sent.at} /></> : null}, {roundWords(s.round) ?? 'first round'}</p>
      <h1>{s.title}</h1>
      <p className="opening mid">{openingWords(review)}</p>
      <Facts items={[
        { term: 'Submitted by', value: s.organisation.name },
        { term: 'Device', value: s.device ? <><span className="nowrap">{s.device.name}</span> of {s.device.provider.name}, {s.register.join(', ')}</> : s.register.join(', ') },
        { term: 'Gate class', value: s.gateClass?.title ?? 'none of the registry; never ranked' },
        { term: 'Run sheet', value: s.runSheet ?? 'none; never ranked' },
        { term: 'Circuits', value: formatCount(s.file.circuits) },
        { term: 'File', value: <><a href={s.file.href} download={s.file.name}>{s.file.name}</a>, {formatBytes(s.file.bytes)}</> },
      ]} />
    </div>
  );
}
