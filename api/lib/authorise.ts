import { judge, type Action, type Thing } from '#shared/domain/rules.ts';
import { stateWords } from '#shared/domain/life-cycle.ts';
import { AppError } from '#shared/errors/app-error.ts';
import type { Caller } from './caller.ts';

/** Throws unless the rule table lets this caller do this to this thing. The sentence says why it is closed. */
export const authorise = (action: Action, caller: Caller, thing: Thing = { owner: null }): void => {
  const verdict = judge(action, caller.asker, thing);
  if (verdict.allowed) return;
  switch (verdict.why) {
    case 'sign-in':
      throw new AppError('not-signed-in', 'This is open only to people who are signed in.');
    case 'interest':
      throw new AppError('not-allowed', 'This is not open to you. You belong, or belonged in the last 12 months, to the organisation it comes from.');
    case 'state':
      throw new AppError('wrong-state', `This cannot be done now: its state is "${thing.state ? stateWords[thing.state].toLowerCase() : 'unknown'}".`);
    case 'standing':
      throw new AppError('not-allowed', refusal(caller, thing));
  }
};

const refusal = (caller: Caller, thing: Thing): string => {
  if (caller.token) return 'This is not open to API tokens, or it belongs to another organisation than the token.';
  if (thing.owner !== null && caller.asker.contributorOf.length > 0) return 'This is not open to you. It belongs to another organisation.';
  return 'This is not open to you. It asks for a role that you do not hold.';
};
