import type { CampaignPlan, CampaignSummary, CampaignView } from '#shared/contracts/campaigns.ts';
import { formatCount, plural } from '#shared/domain/format.ts';

type Counts = CampaignSummary['counts'];

const versions = (n: number): string => `${formatCount(n)} ${plural(n, 'version')}`;

/** Versions that need nothing more, whatever came of them. */
export const ended = ({ done, failed, skipped, cancelled }: Counts): number => done + failed + skipped + cancelled;

/** "12 of 40 estimated, 1 failed, 2 running, 25 waiting" */
export const countWords = (counts: Counts): string => {
  const others = [
    [counts.failed, 'failed'], [counts.skipped, 'left out'], [counts.cancelled, 'not done'], [counts.running, 'running'], [counts.waiting + counts.queued, 'waiting'],
  ] as const;
  return [`${formatCount(counts.done)} of ${formatCount(counts.total)} estimated`, ...others.filter(([n]) => n > 0).map(([n, word]) => `${formatCount(n)} ${word}`)].join(', ');
};

/** What a start would do, and what it leaves out and why. */
export const planWords = ({ method, toEstimate, present, embargoed, withdrawn }: CampaignPlan): string[] => [
  toEstimate === 0 ? `Nothing to estimate: every public version has a result by ${method} already.` : `${versions(toEstimate)} of entries would be estimated with ${method}.`,
  ...(present > 0 && toEstimate > 0 ? [`${versions(present)} ${plural(present, 'has', 'have')} a result by ${method} already and ${plural(present, 'is', 'are')} not estimated again.`] : []),
  ...(embargoed > 0 ? [`${versions(embargoed)} under embargo ${plural(embargoed, 'is', 'are')} left out. Once public, a later campaign takes ${plural(embargoed, 'it', 'them')} up.`] : []),
  ...(withdrawn > 0 ? [`${versions(withdrawn)} withdrawn ${plural(withdrawn, 'is', 'are')} left out: the data is no longer used.`] : []),
];

/** One sentence on where a campaign stands and what happens next. */
export const standingWords = (campaign: Pick<CampaignView, 'state' | 'counts' | 'held'>): string => {
  const { state, counts, held } = campaign;
  if (state === 'cancelled') return counts.running > 0 ? 'Cancelled. What runs ends by itself; results that are there stay.' : 'Cancelled. Results that are there stay.';
  if (state === 'paused') return counts.running > 0 ? 'Paused. What runs ends by itself; nothing more is handed out.' : 'Paused. Nothing is handed out until it goes on.';
  if (state === 'finished') return counts.failed > 0 ? 'Finished, with failures: their reasons stand below.' : 'Finished. Every result stands beside the frozen one on its entry’s page.';
  if (held) return 'Held back. Estimates and run sheets of contributors come first; it goes on within a minute of the last of them.';
  return 'Running. You may leave this page; it goes on by itself.';
};

/** Names of the queues in words. */
export const queueWords: Readonly<Record<string, string>> = {
  estimate: 'Checks and estimates of submissions', 'draw-sheet': 'Drawing of run sheets', 'lift-embargoes': 'Ends of embargoes', 'deliver-mail': 'Mail', 're-estimate': 'Campaign estimates',
  'advance-campaigns': 'Handing out of campaigns', 'house-keeping': 'House-keeping', 'register-dois': 'Registration of DOIs', opinions: 'Second opinions',
};
export const queueName = (name: string): string => queueWords[name] ?? name;
