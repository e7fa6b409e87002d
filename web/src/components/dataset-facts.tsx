import { formatSpan } from '#shared/domain/format-date.ts';
import { formatCount, joinWords, plural } from '#shared/domain/format.ts';
import type { DatasetSummary } from '#web/lib/dataset-summary.ts';
import { Ledger } from './facts.tsx';

/** What was read from a dataset file, before anything is sent. */
export function DatasetFacts({ summary: s }: { summary: DatasetSummary }) {
  return (
    <Ledger items={[
      { term: 'Title', value: s.title },
      { term: 'Device', value: `${s.device} of ${s.provider}, ${plural(s.register.length, 'qubit')} ${s.register.join(', ')}` },
      { term: 'Gate class', value: s.gateClass === 'custom' ? 'custom: estimated, never ranked' : s.gateClass },
      { term: 'Run sheet', value: s.runSheet ?? 'none: a design of your own is estimated, never ranked' },
      { term: 'Circuits', value: `${formatCount(s.circuits)}, ${s.lengths.shortest === s.lengths.longest ? `all of ${s.lengths.longest} gates` : `${s.lengths.shortest} to ${s.lengths.longest} gates long`}${s.patches > 1 ? `, in ${s.patches} patches` : ''}` },
      { term: 'Shots in all', value: formatCount(s.shots) },
      { term: 'Blocks', value: s.blocks === 0 ? 'none named: drift is not tested' : formatCount(s.blocks) },
      { term: 'Run', value: formatSpan(s.startedAt, s.endedAt) },
      { term: 'Contributors', value: joinWords(s.contributors) },
      { term: 'Licence', value: s.licence },
    ]} />
  );
}
