import { Part, PartLink } from '../components/part.tsx';
import { Tex } from '../components/tex.tsx';

const t = String.raw;

export function RunSheets() {
  return (
    <Part id="run-sheets" aside="Drawn by the registry, not chosen by the provider.">
      <p className="prose">A run sheet holds <Tex>N</Tex> circuits to estimate from and <Tex>{t`\lceil N/4 \rceil`}</Tex> sealed ones, a fifth of the sheet. All are drawn together: a length uniformly from the list of the gate class, then every gate uniformly from its drawing list. Sealed are those with the smallest HMAC-SHA256 of their id under a secret of 32 random bytes, which has nothing to do with the seed of the draw. The sheet prints the SHA-256 of the secret; the secret itself is revealed when the entry is frozen, and lies in its archive. Nobody can tell beforehand which circuits are sealed, and the registry cannot change its mind.</p>
      <p className="prose">A sheet is drawn again, with new circuits and a new secret, until the circuits that are not sealed are sound by themselves. If 200 draws fail, <Tex>N</Tex> is raised by tenths, and the first number that was sound is named.</p>
      <p className="prose">The least sizes for ranking are 200 circuits of 500 shots for one qubit, 1200 of 1000 for a joint pair, and 600 of 1000 for each pair of a chained register. A sheet counts once: it stays used from the moment its dataset was estimated, so that nobody may try again until the sealed check comes out well.</p>
    </Part>
  );
}

export function Chained() {
  return (
    <Part id="chained" aside="Registers of two to many qubits, at a cost that grows with their number.">
      <p className="prose">Every qubit has a patch of its own, estimated jointly as one qubit. These results are then held fixed, in their own gauge, and the entangling gates of each pair are estimated from the circuits of the pair: <Tex>D(D-1) = 240</Tex> parameters a gate, all entangling gates of a pair together, with forward and backward vectors from the estimated local gates, preparation and readout. Replicate <Tex>b</Tex> of a pair rests on replicate <Tex>b</Tex> of its qubits; the inverse is kept. Idle qubits are left alone.</p>
      <p className="prose">A pair is judged at the <em>ideal</em> local gates: rank 240 for each entangling gate and a smallest singular value of at least a hundredth of the greatest. At estimated gates, noise can make a deficient design look as though it had full rank. A pair that fails is called unsound, and what would follow from it is not determined. A circuit of the register is determined if every qubit it touches is complete and every pair whose gate it uses is sound.</p>
      <p className="prose">On its sheet each qubit gets <Tex>{t`\max(200, \lceil N/3 \rceil)`}</Tex> circuits and each pair <Tex>N</Tex>; every patch seals a quarter more of its own. Forty further circuits run over the whole register, and all of them are sealed: prediction error and sealed check are those of the register. Figures of single gates are given for any size; predictions of the whole register up to eight qubits, with 200 replicates from five qubits on.</p>
    </Part>
  );
}

export function Limits() {
  return (
    <Part id="limits">
      <ul className="prose limits">
        <li>The expansion is sound while circuit length times error strength stays well below one. That is common practice and has no source. Beyond it the passes do not settle, and the entry says so.</li>
        <li>The model is Markovian and trace preserving. Leakage and drift are not in it; the misfit and the sealed circuits are there to show them.</li>
        <li>No positivity is forced. Small negative eigenvalues of an estimated map are normal within noise.</li>
        <li>At 1000 shots, a fit of 1023 parameters can predict worse than the ideal model where errors are near one in a thousand. The error of the ideal model therefore always stands beside ours.</li>
        <li>Figures beyond twice the longest circuit of the estimate are extrapolated.</li>
        <li>For a gate set that is not complete, predictions hold to first order only; it is never ranked.</li>
        <li>Intervals hold where the <a href="#coverage">coverage study</a> shows that they do, and are not claimed to hold elsewhere.</li>
      </ul>
      <div className="msg caution">
        <span className="kind">Caution</span>
        <div><p>Figures hold for the qubits, gates and dates stated with them. They do not replace acceptance testing under a contract.</p></div>
      </div>
    </Part>
  );
}

export function SecondOpinions() {
  return (
    <Part id="second-opinions" aside="For curators, and on an entry under their own heading. Never on a board.">
      <p className="prose">The same counts can be read by other published routes, and a curator should see whether they agree: the single pass of <PartLink id="passes" />; process tomography by linear inversion that takes preparation and readout as ideal, and so shows what that assumption costs; iterative maximum likelihood under trace preservation, started from this estimate, with and without projection to completely positive maps; and, where the circuits were drawn as preparation, repeated block and readout, a linear analysis of that structure.</p>
      <p className="prose">Each opinion is shown with its own prediction error on the sealed circuits, its distance from the official figure in units of the interval, and its running time. None of them changes a figure.</p>
    </Part>
  );
}
