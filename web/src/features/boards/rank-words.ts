import type { BoardSummary, RankRange } from '#shared/contracts/boards.ts';
import { capitalise, countInWords, joinWords } from '#shared/domain/format.ts';

const endings: Readonly<Record<string, string>> = { one: 'st', two: 'nd', few: 'rd', other: 'th' };
const rules = new Intl.PluralRules('en', { type: 'ordinal' });

/** "1st", "12th" */
export const ordinal = (place: number): string => `${place}${endings[rules.select(place)] ?? 'th'}`;

/** "1 to 3"; "4th" only where the range is one place. */
export const rangeWords = ({ low, high }: Pick<RankRange, 'low' | 'high'>): string => (low === high ? ordinal(low) : `${low} to ${high}`);

/** "Ranks 1 to 3", "Rank 4": heading of a part of the board. */
export const ranksTitle = (low: number, high: number): string => (low === high ? `Rank ${low}` : `Ranks ${low} to ${high}`);

/** Who may be first: how many ranges begin at 1, and how far down these reach. */
export const leadOf = (ranges: readonly Pick<RankRange, 'low' | 'high'>[]): NonNullable<BoardSummary['first']> => {
  const leading = ranges.filter(({ low }) => low === 1);
  return { entries: leading.length, to: Math.max(...leading.map(({ high }) => high)), of: ranges.length };
};

/** "Three entries share ranks 1 to 3": what a board tells of its first place. */
export const firstWords = ({ entries, to, of }: NonNullable<BoardSummary['first']>): string => {
  if (entries === of) return of === 2 ? 'The two cannot be told apart' : 'No two entries can be told apart';
  if (entries === 1) return 'One entry holds rank 1';
  return to === entries ? `${capitalise(countInWords(entries))} entries share ranks 1 to ${to}` : `${capitalise(countInWords(entries))} entries may hold rank 1`;
};

const mostNamed = 4;

/** Which places are certain, in a sentence: "Two places are certain: the 4th and the 12th." */
export const certainWords = (ranges: readonly Pick<RankRange, 'low' | 'high'>[]): string => {
  const certain = ranges.filter(({ low, high }) => low === high).map(({ low }) => low).sort((a, b) => a - b);
  if (certain.length === 0) return 'No place is certain.';
  if (certain.length === ranges.length) return 'Every place is certain.';
  const count = `${capitalise(countInWords(certain.length))} ${certain.length === 1 ? 'place is' : 'places are'} certain`;
  return certain.length > mostNamed ? `${count}.` : `${count}: ${joinWords(certain.map((place) => `the ${ordinal(place)}`))}.`;
};
