import { submissionStates, type SubmissionState } from '#shared/domain/life-cycle.ts';
import { contributors, curator, onlooker, steward, type Found } from './found.ts';

/** A page to look at: its short name, its address and who looks; null = without sign-in. */
export interface PageToVisit {
  name: string;
  path: (found: Found) => string;
  as?: (found: Found) => string;
  /** The page asks for something that is refused or not there. */
  refusals?: boolean;
}

const fixed = (name: string, path: string, more: Partial<PageToVisit> = {}): PageToVisit => ({ name, path: () => path, ...more });
const asCurator = { as: () => curator };
const asContributor = { as: () => contributors[0] ?? '' };

const publicPages: readonly PageToVisit[] = [
  fixed('home', '/'),
  fixed('boards', '/boards'),
  fixed('board', '/boards/quarter-turn-1q/1'),
  fixed('board-pair', '/boards/quarter-turn-cz-2q/1'),
  fixed('board-unranked', '/boards/half-turn-1q/1'),
  fixed('board-missing', '/boards/no-such-class/1', { refusals: true }),
  { name: 'entry', path: (found) => `/entries/${found.entry}` },
  { name: 'entry-superseded', path: (found) => `/entries/${found.superseded}/v/1` },
  fixed('entry-missing', '/entries/EVB-999999', { refusals: true }),
  fixed('devices', '/devices'),
  { name: 'device', path: (found) => `/devices/${found.device}` },
  fixed('method', '/method'),
  fixed('log', '/log'),
  fixed('schema', '/schema'),
  fixed('find', '/find?q=a'),
  fixed('find-nothing', '/find?q=nothing-of-that-name'),
  fixed('problem', '/problems/unusable-file'),
  fixed('missing', '/no-such-page', { refusals: true }),
  fixed('desk-signed-out', '/desk'),
  fixed('review-signed-out', '/review'),
];

const deskPages: readonly PageToVisit[] = [
  fixed('desk', '/desk', asContributor),
  fixed('run-sheets', '/desk/run-sheets', asContributor),
  fixed('run-sheet-new', '/desk/run-sheets/new', asContributor),
  { name: 'run-sheet', path: ({ sheet }) => `/desk/run-sheets/${sheet.id}`, as: ({ sheet }) => sheet.person },
  fixed('submissions', '/desk/submissions', asContributor),
  fixed('submission-new', '/desk/submissions/new', asContributor),
  fixed('own-devices', '/desk/devices', asContributor),
  fixed('tokens', '/desk/tokens', asContributor),
  fixed('desk-onlooker', '/desk', { as: () => onlooker }),
  fixed('review-contributor', '/review', asContributor),
  { name: 'submission-foreign', path: (found) => `/desk/submissions/${found.submissions.get('ready')?.id ?? ''}`, as: () => onlooker, refusals: true },
];

/** States in which a submission rests; "draft" and "accepted" pass in the moment they begin, and nothing is withdrawn yet. */
const resting: readonly SubmissionState[] = submissionStates.filter((state) => !['draft', 'accepted', 'withdrawn'].includes(state));

const submissionPage = (state: SubmissionState): PageToVisit => {
  const of = ({ submissions }: Found): { id: string; person: string } => {
    const one = submissions.get(state);
    if (!one) throw new Error(`No submission rests at "${state}".`);
    return one;
  };
  return { name: `submission-${state}`, path: (found) => `/desk/submissions/${of(found).id}`, as: (found) => of(found).person };
};

const reviewPages: readonly PageToVisit[] = [
  fixed('review', '/review', asCurator),
  { name: 'review-case', path: ({ cases }) => `/review/${cases[0] ?? ''}`, ...asCurator },
  fixed('withdrawals', '/review/withdrawals', asCurator),
  fixed('review-missing', '/review/S-999999', { ...asCurator, refusals: true }),
  fixed('desk-curator', '/desk', asCurator),
];

const asSteward = { as: () => steward };
const officePages: readonly PageToVisit[] = [
  fixed('office-campaigns', '/steward/campaigns', asSteward),
  fixed('office-campaign-missing', '/steward/campaigns/C-999999', { ...asSteward, refusals: true }),
  fixed('office-jobs', '/steward/jobs', asSteward),
  fixed('office-mail', '/steward/mail', asSteward),
  fixed('office-people', '/steward/people', asSteward),
  fixed('office-closed', '/steward', asCurator),
];

/** Every page of the site, in every state that it has of its own. */
export const pages: readonly PageToVisit[] = [...publicPages, ...deskPages, ...resting.map(submissionPage), ...reviewPages, ...officePages];

export const widths = [{ width: 1440, height: 900 }, { width: 390, height: 844 }] as const;
export const schemes = ['light', 'dark'] as const;
