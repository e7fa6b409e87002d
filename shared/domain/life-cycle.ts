/** Life of a submission: the states and every permitted move. One function in the service carries out each move. */

export const submissionStates = [
  'draft', 'checking', 'blocked', 'ready', 'in-review', 'returned', 'declined', 'accepted', 'embargoed', 'frozen', 'superseded', 'withdrawn', 'cancelled',
] as const;
export type SubmissionState = (typeof submissionStates)[number];

/** States an entry version can be in; rows of an append-only table. */
export const entryStates = ['embargoed', 'frozen', 'superseded', 'withdrawn'] as const;
export type EntryState = (typeof entryStates)[number];

export type Move =
  | 'receive' | 'check' | 'block' | 'pass' | 'replace' | 'send' | 'return' | 'decline' | 'accept' | 'embargo' | 'freeze' | 'lift' | 'supersede' | 'withdraw' | 'cancel';

export type Mover = 'contributor' | 'curator' | 'registry';

export interface MoveRule {
  from: readonly SubmissionState[] | 'nothing';
  to: SubmissionState;
  by: Mover;
}

export const moves: Readonly<Record<Move, MoveRule>> = {
  receive: { from: 'nothing', to: 'draft', by: 'contributor' },
  check: { from: ['draft'], to: 'checking', by: 'registry' },
  block: { from: ['checking'], to: 'blocked', by: 'registry' },
  pass: { from: ['checking'], to: 'ready', by: 'registry' },
  replace: { from: ['blocked', 'returned'], to: 'draft', by: 'contributor' },
  send: { from: ['ready'], to: 'in-review', by: 'contributor' },
  return: { from: ['in-review'], to: 'returned', by: 'curator' },
  decline: { from: ['in-review'], to: 'declined', by: 'curator' },
  accept: { from: ['in-review'], to: 'accepted', by: 'curator' },
  embargo: { from: ['accepted'], to: 'embargoed', by: 'registry' },
  freeze: { from: ['accepted'], to: 'frozen', by: 'registry' },
  lift: { from: ['embargoed'], to: 'frozen', by: 'registry' },
  supersede: { from: ['frozen'], to: 'superseded', by: 'registry' },
  withdraw: { from: ['frozen', 'superseded'], to: 'withdrawn', by: 'curator' },
  cancel: { from: ['draft', 'checking', 'blocked', 'ready', 'in-review', 'returned'], to: 'cancelled', by: 'contributor' },
};

/** May this move start from this state? `null` stands for "no submission yet". */
export const mayMove = (move: Move, from: SubmissionState | null): boolean => {
  const rule = moves[move];
  return rule.from === 'nothing' ? from === null : from !== null && rule.from.includes(from);
};

/** A submission that still counts when the same content is sent again. */
export const isLive = (state: SubmissionState): boolean => state !== 'cancelled' && state !== 'declined' && state !== 'withdrawn';

export const stateWords: Readonly<Record<SubmissionState, string>> = {
  draft: 'Draft', checking: 'Checking', blocked: 'Blocked', ready: 'Ready', 'in-review': 'In review', returned: 'Returned', declined: 'Declined',
  accepted: 'Accepted', embargoed: 'Embargoed', frozen: 'Frozen', superseded: 'Superseded', withdrawn: 'Withdrawn', cancelled: 'Cancelled',
};
