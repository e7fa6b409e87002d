import { Link } from 'react-router-dom';
import type { Entry } from '#shared/contracts/entries.ts';
import { formatDate } from '#shared/domain/format-date.ts';
import { formatBytes, formatCount, formatNumber, joinWords } from '#shared/domain/format.ts';
import { Ledger, type Fact } from '#web/components/facts.tsx';
import { Section } from '#web/components/section.tsx';
import { modalityWords } from '#web/lib/modality-words.ts';
import { qubitNames } from '../entry-words.ts';

const span = (low: number, high: number): string => (low === high ? formatCount(low) : `${formatCount(low)} to ${formatCount(high)}`);

function Designs({ entry }: { entry: Entry }) {
  return (
    <span className="lines">
      {entry.patches.map((p) => (
        <span key={p.qubits.join('-')}>
          {entry.patches.length > 1 ? `${qubitNames(entry, p.qubits)}: ` : ''}{formatCount(p.columns)} columns, rank {formatCount(p.rank)} of {formatCount(p.columns - p.gaugeDimension)}, σ<sub>r</sub>/σ<sub>1</sub> {formatNumber(p.conditionRatio, 3)}
          {[!p.complete ? 'incomplete' : '', !p.sound ? 'not sound' : '', p.rankAmbiguous ? 'rank ambiguous' : '', !p.settled ? 'not settled' : ''].filter(Boolean).map((word) => `, ${word}`).join('')}
        </span>
      ))}
    </span>
  );
}

/** Where the data came from, and the exact files with their digests. */
export function ProvenanceSection({ entry }: { entry: Entry }) {
  const { provenance: p, circuits: c, links, state } = entry;
  const people = joinWords(p.contributors.map((person) => (person.orcid ? `${person.name} (${person.orcid})` : person.name)));
  const file = (href: string, words: string) => (state === 'withdrawn' ? <span className="quiet">{words}, not handed out</span> : <a href={href} download>{words}</a>);
  const items: Fact[] = [
    { term: 'Title', value: entry.title },
    { term: 'Contributor', value: `${p.organisation}: ${people}` },
    { term: 'Device', value: `${entry.device.name}, ${modalityWords[entry.device.modality]}${p.firmware ? `, firmware ${p.firmware}` : ''}` },
    { term: 'Run sheet', value: `${p.runSheet ?? 'none, a design of the contributor’s own'}; ${formatCount(c.estimated)} circuits estimated from, ${formatCount(c.sealed)} sealed, lengths ${span(c.minLength, c.maxLength)}, ${span(c.minShots, c.maxShots)} shots each` },
    { term: 'Design', value: <Designs entry={entry} /> },
    { term: 'Software', value: p.software },
    ...(p.notes ? [{ term: 'Notes', value: p.notes }] : []),
    { term: 'Reviewed', value: <>{formatDate(p.reviewedAt)} by a curator of another organisation{p.reviewNote ? <span className="lines"><span>“{p.reviewNote}”</span></span> : null}</> },
    { term: 'Dataset', value: <>{file(links.dataset, p.fileName)}, {formatBytes(p.bytes)}, {p.licence}; the exact bytes that were sent</> },
    { term: 'Result', value: <>{file(links.result, 'result.json')}; every figure, interval and gate map</> },
    { term: 'Replicates', value: <>{file(links.replicates, 'replicates')}; {formatCount(entry.replicates)} bootstrap replicates of every figure, float64 little-endian</> },
    ...(links.seal ? [{ term: 'Seal', value: <>{file(links.seal, 'seal.json')}; the secret that chose the sealed circuits</> }] : []),
    ...(links.runSheet ? [{ term: 'Run sheet file', value: <><a href={links.runSheet} download>run-sheet.json</a>; the circuits as they were drawn, with the digest of the secret</> }] : []),
    { term: 'Archive', value: <>{file(links.archive, `${entry.accession}.${entry.version}.zip`)}; all of these files with their digests, always the same bytes</> },
    { term: 'Log', value: <><a href={`/api/v1/entries/${entry.accession}/v/${entry.version}/proof`}>proof.json</a>; shows that this version is a leaf of the <Link to="/log">public log</Link></> },
    { term: 'Content id', value: <span className="hash">{p.contentId}</span> },
    { term: 'SHA-256 of the bytes', value: <span className="hash">{p.bytesSha256}</span> },
    { term: 'SHA-256 of the result', value: <span className="hash">{p.resultSha256}</span> },
    { term: 'SHA-256 of the replicates', value: <span className="hash">{p.replicatesSha256}</span> },
  ];
  return <Section title="Provenance" id="files"><Ledger items={items} /></Section>;
}
