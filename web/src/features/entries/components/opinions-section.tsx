import { useQuery } from '@tanstack/react-query';
import type { Entry } from '#shared/contracts/entries.ts';
import { notOfficial, OpinionsView } from '#web/components/opinions/opinions-view.tsx';
import { Read } from '#web/components/read.tsx';
import { Section } from '#web/components/section.tsx';
import { entryOpinionsQuery } from '../api/opinions.ts';
import { gateWords, qubitNames } from '../entry-words.ts';

/** Other routes to the figures, after the official ones and under their own heading. */
export function OpinionsSection({ entry }: { entry: Entry }) {
  const query = useQuery(entryOpinionsQuery(entry.accession, entry.version));
  const naming = { gate: (label: string) => gateWords(entry, label), qubits: (qubits: readonly number[]) => qubitNames(entry, qubits) };
  return (
    <Section title="Second opinions" aside={notOfficial} id="second-opinions">
      <Read query={query} what="This section" loading="Loading the second opinions">{(data) => <OpinionsView data={data} naming={naming} />}</Read>
    </Section>
  );
}
