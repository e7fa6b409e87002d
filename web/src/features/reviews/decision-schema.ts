import { z } from 'zod';
import { reviewDecision, type ReviewDecision } from '#shared/contracts/reviews.ts';

export type Outcome = ReviewDecision['outcome'];

/** The form starts without an outcome and without the curator's word; the contract's rules judge the rest. */
export const decisionSchema = reviewDecision.extend({ outcome: z.enum(reviewDecision.shape.outcome.options, { error: 'Choose what you decide.' }) });

export const outcomes: readonly { value: Outcome; title: string; hint: string }[] = [
  { value: 'accept', title: 'Accept', hint: 'Frozen and public at once, or after the embargo' },
  { value: 'return', title: 'Return', hint: 'Back to draft, with what must change' },
  { value: 'decline', title: 'Decline', hint: 'Closed; the reason is kept' },
];

/** The words of the button and of the reason's hint follow the choice. */
export const decisionWords = (outcome: Outcome | '', embargoUntil: string | null): { action: string; reasonHint: string; warning: string } => {
  switch (outcome) {
    case 'accept': return {
      action: embargoUntil ? 'Accept under embargo' : 'Accept and freeze', reasonHint: 'Public with the entry',
      warning: 'A frozen version cannot be changed or deleted. It can only be superseded or withdrawn.',
    };
    case 'return': return { action: 'Return to the contributor', reasonHint: 'Say what must change; the contributor reads this', warning: 'The contributor may replace the file or mend the record and send it again.' };
    case 'decline': return { action: 'Decline', reasonHint: 'The contributor reads this', warning: 'A declined submission is closed. The same data may be sent again only as a new submission.' };
    default: return { action: 'Decide', reasonHint: 'Public with the entry if it is accepted', warning: '' };
  }
};
