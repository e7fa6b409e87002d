import type { BoardRow, RankRange } from '#shared/contracts/boards.ts';
import { capitalise, countInWords, joinWords } from '#shared/domain/format.ts';
import { ranksTitle } from './rank-words.ts';

/** A row with a rank range. */
export type RankedRow = BoardRow & { rank: RankRange };

/** Joins neighbours of which no two can be told apart: rows `from` to `to` of its part, drawn `lane` steps in. */
export interface Bracket {
  from: number;
  to: number;
  lane: number;
}

/** Rows between two cuts: every row above differs from every one of these, and so does every row below. */
export interface BoardPart {
  key: string;
  /** Place of its first row among all rows. */
  start: number;
  title: string;
  sentence: string;
  rows: readonly RankedRow[];
  brackets: readonly Bracket[];
}

const tied = (a: RankedRow | undefined, b: RankedRow | undefined): boolean => a !== undefined && b !== undefined && a.rank.tiedWith.includes(b.accession);

/** Longest runs of neighbours in which every two are tied; a run inside another is left out. */
const runsOf = (rows: readonly RankedRow[]): { from: number; to: number }[] => {
  const runs: { from: number; to: number }[] = [];
  for (let from = 0; from < rows.length; from += 1) {
    let to = from;
    while (to + 1 < rows.length && rows.slice(from, to + 1).every((row) => tied(row, rows[to + 1]))) to += 1;
    if (to > from && to > (runs.at(-1)?.to ?? -1)) runs.push({ from, to });
  }
  return runs;
};

/** Overlapping brackets stand beside each other, each in the first lane that is free. */
const laned = (runs: readonly { from: number; to: number }[]): Bracket[] => {
  const ends: number[] = [];
  return runs.map(({ from, to }) => {
    const free = ends.findIndex((end) => end < from);
    const lane = free === -1 ? ends.length : free;
    ends[lane] = to;
    return { from, to, lane };
  });
};

const sentenceOf = (rows: readonly RankedRow[], brackets: readonly Bracket[], all: ReadonlySet<string>): string => {
  const [only, ...others] = rows;
  const hidden = rows.reduce((n, row) => n + row.rank.tiedWith.filter((a) => !all.has(a)).length, 0);
  const unseen = hidden > 0 ? ' Some of the entries that cannot be told apart from these are hidden by the filters.' : '';
  if (only && others.length === 0) return hidden > 0 ? 'Cannot be told apart from entries that the filters hide.' : 'Told apart from every other entry on this board.';
  const [first, second] = brackets;
  if (brackets.length === 1 && first?.from === 0 && first.to === rows.length - 1) return `${capitalise(countInWords(rows.length))} entries that cannot be told apart.${unseen}`;
  const both = brackets.length === 2 && first && second ? rows.slice(second.from, first.to + 1) : [];
  const shared = both.length > 0 && both.length <= 3 ? `; ${joinWords(both.map((row) => row.device.name))} ${both.length === 1 ? 'belongs' : 'belong'} to both` : '';
  return `A chain. Each bracket joins entries that cannot be told apart${shared}.${unseen}`;
};

/** The board cut where every row above differs from every row below, with the brackets inside each part. */
export const boardParts = (rows: readonly RankedRow[]): BoardPart[] => {
  const all = new Set(rows.map((row) => row.accession));
  const places = new Map(rows.map((row, i) => [row.accession, i]));
  const parts: RankedRow[][] = [];
  let reach = -1;
  rows.forEach((row, i) => {
    if (i > reach) parts.push([]);
    parts.at(-1)?.push(row);
    reach = Math.max(reach, i, ...row.rank.tiedWith.map((accession) => places.get(accession) ?? -1));
  });
  return parts.map((part) => {
    const brackets = laned(runsOf(part));
    return {
      key: part[0]?.accession ?? '',
      start: places.get(part[0]?.accession ?? '') ?? 0,
      title: ranksTitle(Math.min(...part.map((r) => r.rank.low)), Math.max(...part.map((r) => r.rank.high))),
      sentence: sentenceOf(part, brackets, all),
      rows: part,
      brackets,
    };
  });
};

/** All rows have a rank range, or none has: a draft of the method ranks nothing, and one entry alone is no ranking. */
export const rankedRows = (rows: readonly BoardRow[]): RankedRow[] | null => {
  const ranked = rows.filter((row): row is RankedRow => row.rank !== null);
  return ranked.length === rows.length && rows.length > 0 ? ranked : null;
};

/** The names of all that a row cannot be told apart from, for those who listen; what filters hide is counted. */
export const tieWords = (row: RankedRow, rows: readonly RankedRow[]): string => {
  const names = rows.filter((other) => tied(row, other)).map((other) => other.device.name);
  const hidden = row.rank.tiedWith.length - names.length;
  const more = hidden > 0 ? [`${countInWords(hidden)} ${hidden === 1 ? 'entry' : 'entries'} that the filters hide`] : [];
  return names.length + more.length === 0 ? 'Told apart from every other entry' : `Cannot be told apart from ${joinWords([...names, ...more])}`;
};
