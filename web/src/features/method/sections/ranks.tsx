import { Link } from 'react-router-dom';
import { Formula, FormulaLink } from '../components/formula.tsx';
import { Part, PartLink } from '../components/part.tsx';
import { Tex } from '../components/tex.tsx';

const t = String.raw;

export function Ranks() {
  return (
    <Part id="ranks" aside="Every place a device may hold, for all devices of a board at once."
      notes={<p>Overlapping intervals do not show that two devices are equal, and rank ranges are not read off them: <strong>the pair is tested</strong>, not its two intervals.</p>}>
      <p className="prose">A board compares <Tex>m</Tex> eligible entries by one figure. For each pair the difference of the estimates is measured in units of its own standard error, which follows from the replicates of both entries, and so is the difference in every replicate:</p>
      <Formula id="pair-t" />
      <p className="prose">Entry <Tex>i</Tex> is surely better than <Tex>j</Tex> if its estimate is the better one and <Tex>{t`t_{ij}`}</Tex> lies above the 95 % quantile of <Tex>{t`t^{*}`}</Tex>. The statements so made are taken out of the maximum, the rest is tested again against the smaller quantile, and so on until none is added. The opposite statement of each pair stays in, so that a wrong direction counts as an error too. The rank range of an entry then is</p>
      <Formula id="places" />
      <p className="prose">With a probability of 95 % the ranges of <em>all</em> entries hold at the same time. A place is printed as one number, such as “4th”, only where the range is one place. Entries of which none is surely better are joined by a bracket: their order says nothing. An interval read off the bootstrap distribution of the rank itself would not hold and is never shown. <PartLink id="rank-study" /> measures how well ours do.</p>
      <p className="prose">Two entries are compared by the difference of their figures replicate by replicate: its own interval, and the share of replicates in which one is better.</p>
      <h3>Eligible</h3>
      <p className="prose">An entry stands on a <Link to="/boards">board</Link> if</p>
      <ul className="prose limits">
        <li>its gate class is a ranked one, and its circuits are those of a run sheet, at the least sizes or above;</li>
        <li>its design is complete, sound and not ambiguous, and its estimate has settled;</li>
        <li>it lies inside the <a href="#domain">domain</a> of the figure by which the board is read;</li>
        <li>its sealed check passed;</li>
        <li>it is the newest of its device and register, and not withdrawn.</li>
      </ul>
      <p className="prose">Only eligible entries enter <FormulaLink id="pair-t" />. Every other entry is public too; below the board stand its name, the reason, and what would change it.</p>
    </Part>
  );
}
