import { checkAdded } from './check-added.ts';
import { checkBytes } from './check-bytes.ts';
import { checkRevealedSeals, checkSheets, checkSubmitted } from './check-files.ts';
import { checkLogTree } from './check-log.ts';
import { checkRecords } from './check-records.ts';
import { checkStates } from './check-states.ts';
import type { ScrubCheck, ScrubContext, Scrubbed } from './finding.ts';

/** Everything the record consists of, in the order of the report. */
const checks: readonly { name: string; run: ScrubCheck }[] = [
  { name: 'files of frozen versions', run: checkBytes },
  { name: 'rows of frozen versions', run: checkRecords },
  { name: 'results added by campaigns', run: checkAdded },
  { name: 'states of frozen versions', run: checkStates },
  { name: 'leaves, subtrees and heads of the log', run: checkLogTree },
  { name: 'run sheets and their seals', run: checkSheets },
  { name: 'revealed seals', run: checkRevealedSeals },
  { name: 'files and estimates of submissions', run: checkSubmitted },
];

/**
 * Hashes the whole record again and holds every part to the others: whatever was changed in the database, by whomever, shows.
 * Reads only. Cost: one reading of all stored bytes; one version in memory at a time.
 */
export const scrub = async (context: ScrubContext, onCheck: (name: string, result: Scrubbed) => void = () => undefined): Promise<Scrubbed> => {
  const total: Scrubbed = { looked: 0, findings: [] };
  for (const { name, run } of checks) {
    const result = await run(context);
    onCheck(name, result);
    total.looked += result.looked;
    total.findings.push(...result.findings);
  }
  return total;
};
