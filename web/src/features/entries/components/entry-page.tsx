import type { Entry } from '#shared/contracts/entries.ts';
import { formatDate } from '#shared/domain/format-date.ts';
import { countInWords, joinWords, plural } from '#shared/domain/format.ts';
import { Section } from '#web/components/section.tsx';
import { Wrap } from '#web/components/wrap.tsx';
import { AllFiguresSection } from './all-figures-section.tsx';
import { CiteSection } from './cite-section.tsx';
import { DepthSection } from './depth-section.tsx';
import { EntryHead } from './entry-head.tsx';
import { EntryNotices } from './entry-notices.tsx';
import { GatesSection } from './gates-section.tsx';
import { OpinionsSection } from './opinions-section.tsx';
import { ProvenanceSection } from './provenance-section.tsx';
import { RecomputeSection } from './recompute-section.tsx';
import { SealedSection } from './sealed-section.tsx';
import { VersionsSection } from './versions-section.tsx';

/** One version of an entry, whole. */
export function EntryPage({ entry }: { entry: Entry }) {
  const { register, gates, provenance } = entry;
  return (
    <>
      <Wrap><EntryHead entry={entry} /></Wrap>
      <Wrap>
        <EntryNotices entry={entry} />
        <DepthSection entry={entry} />
        <GatesSection entry={entry} />
        <SealedSection entry={entry} />
        <AllFiguresSection entry={entry} />
        <OpinionsSection entry={entry} />
        <ProvenanceSection entry={entry} />
        <RecomputeSection entry={entry} />
        <CiteSection entry={entry} />
        <VersionsSection entry={entry} />
        <Section title="Caution">
          <p className="prose">Results hold for {plural(register.length, 'qubit')} {joinWords(register)}, the {countInWords(gates.length)} {plural(gates.length, 'gate')} named and {formatDate(provenance.startedAt)}{formatDate(provenance.endedAt) === formatDate(provenance.startedAt) ? '' : ` to ${formatDate(provenance.endedAt)}`}. They do not replace acceptance testing under a contract. The model has no leakage and no drift; small negative eigenvalues of the estimated maps are normal within noise.</p>
        </Section>
        <p className="printonly small">{entry.accession}.{entry.version}, {entry.links.page}, content id {provenance.contentId}</p>
      </Wrap>
    </>
  );
}
