import type { SubmissionState } from './life-cycle.ts';

/**
 * Who may do what: the one table of access rules. A route names an action; the action's rule names the
 * standings that open it and, where the thing has a state, the states in which it is open.
 *
 * Standings are relative to the thing asked for:
 *   anyone       also without sign-in
 *   member       any signed-in person
 *   contributor  a contributor of the organisation that owns the thing (or, where there is no thing yet, of the one named)
 *   curator      a curator without interest: not of the owning organisation now or in the last 12 months
 *   steward      looks after people, organisations, classes and jobs; sees, but does not decide
 */
export type Standing = 'anyone' | 'member' | 'contributor' | 'curator' | 'steward';

export interface Rule {
  standings: readonly Standing[];
  /** Open only in these states; absent = in all. */
  states?: readonly SubmissionState[];
  /** The curator's standing counts only in these states; absent = in all. */
  curatorStates?: readonly SubmissionState[];
  /** May an API token of the organisation stand in for a person? */
  token?: boolean;
}

const editable: readonly SubmissionState[] = ['draft', 'checking', 'blocked', 'ready', 'returned'];
const underReview: readonly SubmissionState[] = ['in-review'];
/** Public and not withdrawn. */
const inUse: readonly SubmissionState[] = ['frozen', 'superseded'];
/** What was sent to a curator once; before that it is the contributor's own affair. */
const sent: readonly SubmissionState[] = ['in-review', 'returned', 'declined', 'accepted', 'embargoed', 'frozen', 'superseded', 'withdrawn'];

export const rules = {
  'public.read': { standings: ['anyone'], token: true },
  'session.read': { standings: ['anyone'] },
  'session.end': { standings: ['member'] },

  'device.list-own': { standings: ['contributor'], token: true },
  'device.create': { standings: ['contributor'] },

  'token.list': { standings: ['contributor'] },
  'token.create': { standings: ['contributor'] },
  'token.revoke': { standings: ['contributor'] },

  'run-sheet.list': { standings: ['contributor'], token: true },
  'run-sheet.create': { standings: ['contributor'], token: true },
  'run-sheet.read': { standings: ['contributor', 'curator', 'steward'], token: true },

  'submission.list': { standings: ['contributor'], token: true },
  'submission.create': { standings: ['contributor'], token: true },
  'submission.read': { standings: ['contributor', 'curator', 'steward'], curatorStates: sent, token: true },
  'submission.edit': { standings: ['contributor'], states: editable, token: true },
  // Not from ready: whoever may try files against the sealed check can find out which circuits are sealed.
  'submission.replace': { standings: ['contributor'], states: ['blocked', 'returned'], token: true },
  'submission.send': { standings: ['contributor'], states: ['ready'], token: true },
  'submission.cancel': { standings: ['contributor'], states: [...editable, 'in-review'], token: true },
  'submission.write-message': { standings: ['contributor', 'curator'], states: [...editable, 'in-review', 'accepted', 'embargoed', 'frozen', 'superseded'], curatorStates: sent, token: true },

  // Other routes to the figures, for who decides; public once the entry is. A contributor is judged by the official figures alone.
  'opinion.read': { standings: ['curator', 'steward'], curatorStates: sent },

  'review.queue': { standings: ['curator'] },
  'review.read': { standings: ['curator'] },
  'review.claim': { standings: ['curator'], states: underReview },
  'review.release': { standings: ['curator'], states: underReview },
  'review.decide': { standings: ['curator'], states: underReview },

  'withdrawal.list': { standings: ['curator'] },
  'withdrawal.ask': { standings: ['curator'], states: inUse },
  'withdrawal.answer': { standings: ['curator'], states: [...inUse, 'withdrawn'] },

  'campaign.read': { standings: ['steward'] },
  'campaign.start': { standings: ['steward'] },
  'campaign.pause': { standings: ['steward'] },
  'campaign.resume': { standings: ['steward'] },
  'campaign.cancel': { standings: ['steward'] },
  'campaign.retry': { standings: ['steward'] },

  'audit.read': { standings: ['steward'] },
  'job.read': { standings: ['steward'] },
  'job.retry': { standings: ['steward'] },
  'mail.read': { standings: ['steward'] },
  'people.read': { standings: ['steward'] },
  'people.change': { standings: ['steward'] },
} as const satisfies Record<string, Rule>;

export type Action = keyof typeof rules;
export const ruleOf = (action: Action): Rule => rules[action];

/** Months after leaving an organisation during which a curator still has an interest in it. */
export const interestMonths = 12;

/** What the rule table needs to know of the caller and of the thing. */
export interface Asker {
  signedIn: boolean;
  isCurator: boolean;
  isSteward: boolean;
  viaToken: boolean;
  /** Organisations in which the asker is a contributor now. */
  contributorOf: readonly string[];
  /** Organisations belonged to now or within the last `interestMonths` months. */
  interestIn: readonly string[];
}

export interface Thing {
  /** Id of the owning organisation; null where no one owns it. */
  owner: string | null;
  state?: SubmissionState;
}

export type Verdict = { allowed: true } | { allowed: false; why: 'sign-in' | 'standing' | 'interest' | 'state' };

const isTied = (asker: Asker, thing: Thing): boolean => thing.owner !== null && asker.interestIn.includes(thing.owner);

const holds = (standing: Standing, rule: Rule, asker: Asker, thing: Thing): boolean => {
  switch (standing) {
    case 'anyone': return true;
    case 'member': return asker.signedIn;
    case 'contributor': return thing.owner === null ? asker.contributorOf.length > 0 : asker.contributorOf.includes(thing.owner);
    case 'curator': return asker.isCurator && !isTied(asker, thing) && (rule.curatorStates === undefined || thing.state === undefined || rule.curatorStates.includes(thing.state));
    case 'steward': return asker.isSteward;
  }
};

/** The table's answer for one asker, one action and one thing. Pure. */
export const judge = (action: Action, asker: Asker, thing: Thing = { owner: null }): Verdict => {
  const rule = ruleOf(action);
  if (asker.viaToken && !rule.token) return { allowed: false, why: 'standing' };
  if (!rule.standings.some((s) => holds(s, rule, asker, thing))) {
    if (!asker.signedIn && !asker.viaToken) return { allowed: false, why: 'sign-in' };
    return { allowed: false, why: rule.standings.includes('curator') && asker.isCurator && isTied(asker, thing) ? 'interest' : 'standing' };
  }
  if (rule.states && thing.state !== undefined && !rule.states.includes(thing.state)) return { allowed: false, why: 'state' };
  return { allowed: true };
};
