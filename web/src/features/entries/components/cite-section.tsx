import { useQuery } from '@tanstack/react-query';
import { useRef, useState } from 'react';
import type { Citation } from '#shared/contracts/citations.ts';
import type { Entry } from '#shared/contracts/entries.ts';
import { Button } from '#web/components/button.tsx';
import { Read } from '#web/components/read.tsx';
import { Section } from '#web/components/section.tsx';
import { citationQuery } from '../api/citation.ts';

type Style = Citation['styles'][number];

/** The line with its accession in one piece: a hyphen is no place to break a name. */
function Line({ text, name }: { text: string; name: string }) {
  const at = text.indexOf(`(${name})`);
  return at < 0 ? text : <>{text.slice(0, at)}<span className="nowrap">({name})</span>{text.slice(at + name.length + 2)}</>;
}

/** One style: its line, and a button that copies it. Where the browser does not let a page copy, the line is selected. */
function StyleLine({ style, name }: { style: Style; name: string }) {
  const [told, setTold] = useState('');
  const line = useRef<HTMLParagraphElement>(null);
  const byHand = (): void => {
    if (line.current) window.getSelection()?.selectAllChildren(line.current);
    setTold('This browser does not let the page copy. The text is selected; copy it by keyboard.');
  };
  const copy = (): void => {
    // Absent on pages that were not sent over a safe connection.
    if (!('clipboard' in navigator)) return byHand();
    navigator.clipboard.writeText(style.text).then(() => setTold(`Copied in ${style.label} style.`), byHand);
  };
  return (
    <li>
      <h3 className="tbl">{style.label}</h3>
      <p ref={line} className="citation prose"><Line text={style.text} name={name} /></p>
      <div className="copyrow noprint">
        <Button kind="plain" onClick={copy}>Copy <span className="unseen">in {style.label} style</span></Button>
        <p role="status" className="small quiet">{told}</p>
      </div>
    </li>
  );
}

function Doi({ doi }: { doi: Citation['doi'] }) {
  if (!doi) return null;
  if (!doi.resolves) return <p className="small">DOI <span className="nowrap">{doi.value}</span> <span className="quiet">(local stand-in: does not resolve; the lines above name this page instead)</span></p>;
  return <p className="small">DOI <a className="nowrap" href={`https://doi.org/${doi.value}`}>{doi.value}</a></p>;
}

function Lines({ citation }: { citation: Citation }) {
  return (
    <div className="flow">
      <ul className="citations">{citation.styles.map((style) => <StyleLine key={style.style} style={style} name={citation.name} />)}</ul>
      <Doi doi={citation.doi} />
      <p className="takeaway noprint">{citation.formats.map(({ format, label, href }) => <a key={format} href={href} download>{label}</a>)}</p>
    </div>
  );
}

/** How to cite this version: three styles to copy, files for reference managers. It stays when the version is withdrawn. */
export function CiteSection({ entry }: { entry: Entry }) {
  const query = useQuery(citationQuery(entry.accession, entry.version));
  return (
    <Section title="Cite" id="cite" aside={entry.state === 'withdrawn' ? 'As withdrawn.' : undefined}>
      <div className="flow">
        <Read query={query} what="The citation" loading="Loading the citation" rows={3}>{(citation) => <Lines citation={citation} />}</Read>
        <p className="small quiet">Cite the version, not the entry: a version keeps its figures and its method for ever.{entry.demo ? ' This one is invented, for demonstration; entries of the demonstration get no DOI.' : ''}</p>
      </div>
    </Section>
  );
}
