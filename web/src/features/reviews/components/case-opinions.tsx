import { useQuery } from '@tanstack/react-query';
import type { Review } from '#shared/contracts/reviews.ts';
import { joinWords } from '#shared/domain/format.ts';
import { notOfficial, OpinionsView } from '#web/components/opinions/opinions-view.tsx';
import { Read } from '#web/components/read.tsx';
import { submissionOpinionsQuery } from '../api/opinions.ts';

/** Other routes to the figures, for the curator who decides. */
export function CaseOpinions({ submission: s }: { submission: Review['submission'] }) {
  const query = useQuery(submissionOpinionsQuery(s.id));
  const qubits = (places: readonly number[]): string => joinWords(places.map((q) => s.register[q] ?? String(q)));
  const gate = (label: string): string => {
    const found = s.gates.find((g) => g.label === label);
    if (!found) return label;
    return s.register.length < 2 ? found.words : `${found.words} on ${qubits(found.targets)}`;
  };
  return (
    <>
      <p className="says">{notOfficial}</p>
      <Read query={query} what="This section" loading="Loading the second opinions">{(data) => <OpinionsView data={data} naming={{ gate, qubits }} />}</Read>
    </>
  );
}
