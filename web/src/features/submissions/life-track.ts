import { stateWords, type SubmissionState } from '#shared/domain/life-cycle.ts';
import type { Submission } from '#shared/contracts/submissions.ts';

export interface TrackStep {
  state: SubmissionState;
  title: string;
  /** ISO time of the move into this state; null while it lies ahead. */
  at: string | null;
  /** Who makes the step, said while it lies ahead. */
  hint: string;
  place: 'past' | 'now' | 'ahead';
}

const hints: Partial<Record<SubmissionState, string>> = {
  checking: 'the registry checks it', ready: 'you send it', 'in-review': 'a curator reads it', embargoed: 'until the date you name', frozen: 'public for ever',
};

/** The straight road; a state off it takes the place of the step where it was left. */
const road: readonly SubmissionState[] = ['draft', 'checking', 'ready', 'in-review', 'accepted', 'frozen'];
const ends: ReadonlySet<SubmissionState> = new Set(['declined', 'cancelled', 'superseded', 'withdrawn']);
const insteadOf: Partial<Record<SubmissionState, SubmissionState>> = { blocked: 'ready', returned: 'accepted' };

type Life = Pick<Submission, 'state' | 'history' | 'record'>;

/**
 * The line of a submission's life: what is behind (with its time), where it stands, what may follow.
 * Of a state entered more than once only the last time is drawn: the line tells the present round.
 */
export const lifeTrack = ({ state, history, record }: Life): TrackStep[] => {
  const lastAt = (s: SubmissionState): string | null => history.filter((h) => h.state === s).at(-1)?.at ?? null;
  const step = (s: SubmissionState, place: TrackStep['place']): TrackStep =>
    ({ state: s, title: stateWords[s], at: place === 'ahead' ? null : lastAt(s), hint: place === 'ahead' ? hints[s] ?? '' : '', place });

  const round = presentRound(history);
  const behind = round.filter((s) => s !== state);
  if (ends.has(state)) return [...behind.map((s) => step(s, 'past')), step(state, 'now')];

  const anchor = insteadOf[state] ?? (state === 'embargoed' ? 'accepted' : state);
  const ahead = road.slice(road.indexOf(anchor) + 1);
  const withEmbargo = record.embargoUntil && state !== 'embargoed' && state !== 'frozen'
    ? ahead.flatMap((s): SubmissionState[] => (s === 'frozen' ? ['embargoed', 'frozen'] : [s])) : ahead;
  const after = insteadOf[state] === undefined ? withEmbargo : [];
  return [...behind.map((s) => step(s, 'past')), step(state, 'now'), ...after.map((s) => step(s, 'ahead'))];
};

/** States entered since the file was last received. */
const presentRound = (history: Life['history']): SubmissionState[] => {
  const start = history.map((h) => h.state).lastIndexOf('draft');
  return [...new Set(history.slice(Math.max(start, 0)).map((h) => h.state))];
};
