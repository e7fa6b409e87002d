import { Formula, FormulaLink } from '../components/formula.tsx';
import { Part, PartLink } from '../components/part.tsx';
import { RankTable } from '../components/rank-table.tsx';
import { Tex } from '../components/tex.tsx';

const t = String.raw;

export function Inverse() {
  return (
    <Part id="inverse" aside="What a design can tell, and how surely.">
      <p className="prose"><Tex>{'C^+'}</Tex> is the Moore–Penrose inverse. Its rank counts the singular values that are not zero,</p>
      <Formula id="rank" />
      <p className="prose">and counts as <em>ambiguous</em> if any other cut between <Tex>{'10^{-12}'}</Tex> and <Tex>{'10^{-4}'}</Tex> would give another number.</p>
      <h3>Gauge</h3>
      <p className="prose">The matrix is always singular: some changes of the parameters only re-describe the device and leave every probability alone. For any matrix <Tex>X</Tex> with zero first row they are, to first order,</p>
      <Formula id="gauge" />
      <p className="prose">Their span has an orthonormal basis <Tex>Q</Tex>. Where it is the whole null space, the inverse has a closed form, which is exact for every <Tex>c</Tex> in the range given and needs one Cholesky factor:</p>
      <Formula id="inverse" />
      <p className="prose">This form is taken only if <Tex>{t`\lVert CQ \rVert \le 10^{-12}\sigma_1`}</Tex>, the factor exists, and <Tex>{t`\sigma_r \ge 10^{-4}\sigma_1`}</Tex> by inverse iteration. In every other case the singular values of <Tex>C</Tex> itself decide, never those of <Tex>{t`C^{\mathsf T} C`}</Tex>, in which small ones drown.</p>
      <h3>Complete, sound, too weak</h3>
      <p className="prose">A design is <em>complete</em> if nothing but the gauge is lost: <Tex>{t`r = n_{\mathrm{columns}} - \dim Q`}</Tex>. It is <em>sound</em>, as ranking asks, if its rank is the one expected of its gate class, not ambiguous, and <Tex>{t`\sigma_r/\sigma_1 \ge 0.01`}</Tex>. Below <Tex>{'0.001'}</Tex> it is <em>too weak</em>: what it would give is not determined. A design is judged when its run sheet is drawn, and again when the data comes in.</p>
      <RankTable />
      <p className="prose">A pair of a chained register has no gauge of its own; <PartLink id="chained" /> says how it is judged. By <FormulaLink id="columns" /> a pair with five gates has 1263 columns.</p>
    </Part>
  );
}

export function PassesPart() {
  return (
    <Part id="passes" aside="One inverse, used eight times.">
      <p className="prose">Let <Tex>f</Tex> be the observed frequencies and <Tex>p(e)</Tex> the full product of the noisy gates, with no expansion. The first pass is the first-order estimate; seven more correct what it left over, all with the same inverse:</p>
      <Formula id="passes" />
      <p className="prose">The single pass has a bias that grows as the square of the error; it stands in every result as <code>firstOrder</code>. The estimate has <em>settled</em> if its last pass moved the predictions by less than a tenth of shot noise, root mean square over the rows:</p>
      <Formula id="settled" />
      <p className="prose">Here <Tex>n_o</Tex> are the counts of an outcome, <Tex>N</Tex> the shots of its circuit, and <Tex>s</Tex> its smoothed frequency. If a parameter leaves <Tex>[-1, 1]</Tex> or is not finite, the passes stop. Figures, replicates and predictions are then those of the single pass, and the entry says that it has not settled.</p>
    </Part>
  );
}

export function Determined() {
  return (
    <Part id="determined" aside="A gate set cannot reveal everything about itself.">
      <p className="prose">Let the columns of <Tex>N</Tex> be an orthonormal basis of the null space of <Tex>C</Tex>. A linear reading <Tex>{t`w \cdot e`}</Tex> of the parameters is determined if the null space does not touch it:</p>
      <Formula id="estimable" />
      <p className="prose">For a circuit, <Tex>w</Tex> is its own row of <FormulaLink id="row" />; for a gate loss or an angle error it reads <Tex>{t`-\operatorname{tr}E_k/D`}</Tex>, for the error per gate the mean of those, for the retained signal the bench circuits weighted as in <FormulaLink id="retained" />. Output error and prediction error need every one of their circuits. What fails is printed as “not determined”, with the reason. It is not set to zero and not left out.</p>
      <p className="prose">For a gate set that is not complete this holds to first order only. Its predictions are marked so, it is never ranked, and where the counts do not fit the first-order model its intervals are withheld.</p>
    </Part>
  );
}
