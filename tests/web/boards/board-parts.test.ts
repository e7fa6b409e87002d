import { describe, expect, it } from 'vitest';
import { rangesOf } from '#shared/stats/rank-ranges.ts';
import type { BoardRow } from '#shared/contracts/boards.ts';
import { boardParts, rankedRows, tieWords, type RankedRow } from '#web/features/boards/board-parts.ts';
import { boardFixture } from '#tests/support/fixtures/boards.ts';

/** Rows in order, named by letters; `apart` lists the pairs of which the first is surely better. */
const rowsOf = (names: string, apart: readonly string[]): RankedRow[] => {
  const base = boardFixture.rows[0]!;
  const ranges = rangesOf(names.length, (i, j) => apart.includes(`${names[i]}${names[j]}`));
  return [...names].map((name, i): RankedRow => {
    const { low, high, tiedWith } = ranges[i]!;
    return { ...base, accession: name, device: { ...base.device, name }, rank: { low, high, tiedWith: tiedWith.map((j) => names[j]!) } };
  });
};

describe('parts of a board', () => {
  it('are cut where every entry above differs from every entry below, and hold every row once in its order', () => {
    const parts = boardParts(rowsOf('abcd', ['ac', 'ad', 'bc', 'bd', 'cd']));
    expect(parts.map((p) => [p.title, p.start, p.rows.map((r) => r.accession).join('')])).toEqual([['Ranks 1 to 2', 0, 'ab'], ['Rank 3', 2, 'c'], ['Rank 4', 3, 'd']]);
    expect(parts.map((p) => p.sentence)).toEqual(['Two entries that cannot be told apart.', 'Told apart from every other entry on this board.', 'Told apart from every other entry on this board.']);
  });

  it('a chain keeps overlapping brackets beside each other and names who belongs to both', () => {
    const [part, ...others] = boardParts(rowsOf('abc', ['ac']));
    expect(others).toEqual([]);
    expect(part?.brackets).toEqual([{ from: 0, to: 1, lane: 0 }, { from: 1, to: 2, lane: 1 }]);
    expect(part?.sentence).toBe('A chain. Each bracket joins entries that cannot be told apart; b belongs to both.');
  });

  it('a bracket joins neighbours only: a tie over someone who is told apart is told in words', () => {
    const rows = rowsOf('abc', ['ab', 'bc']);
    expect(boardParts(rows).map((p) => [p.rows.length, p.brackets])).toEqual([[3, []]]);
    expect(rows.map((row) => tieWords(row, rows))).toEqual(['Cannot be told apart from c', 'Told apart from every other entry', 'Cannot be told apart from a']);
  });

  it('in every bracket each two are tied, and every tie of neighbours is inside a bracket', () => {
    const rows = rankedRows(boardFixture.rows) ?? [];
    for (const part of boardParts(rows)) {
      for (const { from, to } of part.brackets) for (const a of part.rows.slice(from, to + 1)) for (const b of part.rows.slice(from, to + 1)) expect(a === b || a.rank.tiedWith.includes(b.accession)).toBe(true);
      part.rows.forEach((row, i) => {
        const next = part.rows[i + 1];
        if (next && row.rank.tiedWith.includes(next.accession)) expect(part.brackets.some(({ from, to }) => from <= i && i + 1 <= to)).toBe(true);
      });
    }
  });

  it('what filters hide is counted in words, and no part claims to be told apart from what it hides', () => {
    const shown = rowsOf('abc', ['ac', 'bc']).filter((row) => row.accession !== 'b');
    expect(boardParts(shown)[0]?.sentence).toBe('Cannot be told apart from entries that the filters hide.');
    expect(tieWords(shown[0]!, shown)).toBe('Cannot be told apart from one entry that the filters hide');
  });

  it('nothing is ranked where one row has no range', () => {
    const rows: BoardRow[] = [{ ...boardFixture.rows[0]!, rank: null }, boardFixture.rows[1]!];
    expect([rankedRows(rows), rankedRows([])]).toEqual([null, null]);
  });
});
