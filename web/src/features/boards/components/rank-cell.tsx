import type { RankRange } from '#shared/contracts/boards.ts';
import { rangeWords } from '../rank-words.ts';
import { RankStrip } from './rank-strip.tsx';

/** "1 to 3" over the strip of places. */
export function RankCell({ rank, places }: { rank: RankRange; places: number }) {
  return (
    <>
      <span className="rank">{rank.low === rank.high ? rangeWords(rank) : <>{rank.low}<span className="to"> to </span>{rank.high}</>}</span>
      <RankStrip low={rank.low} high={rank.high} places={places} />
    </>
  );
}
