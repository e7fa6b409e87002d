import type { ReactNode } from 'react';
import { Formula } from '../components/formula.tsx';
import { Part, PartLink } from '../components/part.tsx';
import { Tex } from '../components/tex.tsx';
import type { FormulaId } from '../formulas.ts';

const t = String.raw;

/** One figure: its name is an address, its direction stands beside its name. */
function Definition({ id, title, direction, formula, children }: { id: string; title: string; direction: string; formula: FormulaId; children: ReactNode }) {
  return (
    <div className="definition" id={id}>
      <h3><a href={`#${id}`}>{title}</a></h3>
      <p className="small quiet">{direction}</p>
      <Formula id={formula} />
      <div className="prose">{children}</div>
    </div>
  );
}

export function Figures() {
  return (
    <Part id="figures" aside="All are free of gauge.">
      <p className="prose">Every figure stays the same, exactly, when the device is described in another gauge: <Tex>{t`G \to SGS^{-1}`}</Tex>, <Tex>{t`\rho \to S\rho`}</Tex>, <Tex>{t`M \to S^{-\mathsf T} M`}</Tex>. Throughout, <Tex>p</Tex> is an ideal probability and <Tex>{t`\hat p`}</Tex> the one predicted by the estimate. Bench circuits are the fixed circuits of a gate class at depths 0, 1, 4, 8, 16, 32 and 64; they are public, and each of them carries signal.</p>
      <Definition id="retained-signal" title="Retained signal" direction="Higher is better; 1 is an ideal device, 0 is nothing left" formula="retained">
        <p>How much of the ideal signal is left after <Tex>L</Tex> gates, over all bench circuits <Tex>c</Tex> of that depth and all outcomes <Tex>o</Tex>. Its value at depth 16, <Tex>{'R_{16}'}</Tex>, is the headline of an entry. Beyond twice the longest circuit of the estimate it is called extrapolated and drawn dashed.</p>
      </Definition>
      <Definition id="output-error" title="Output error" direction="Lower is better; 0 is an ideal device" formula="output">
        <p>The mean total variation distance between the predicted and the ideal outcome probabilities, over the <Tex>n_L</Tex> bench circuits of one depth.</p>
      </Definition>
      <Definition id="error-per-gate" title="Error per gate" direction="Lower is better; 0 is an ideal device" formula="per-gate">
        <p>How fast an average gate of the set forgets. <Tex>{t`\lambda`}</Tex> is the eigenvalue, continued from 1, of the map that applies a noisy gate, undoes the ideal one, and is averaged over the gates; a prime marks the block without first row and column. It is defined where the ideal map has the eigenvalue 1 exactly once and no other of that size. Within noise it may come out below zero, and is then printed so. In a chained register it is given for each qubit.</p>
      </Definition>
      <Definition id="gate-loss" title="Gate loss" direction="Lower is better; 0 is an ideal gate" formula="loss">
        <p>Of one gate <Tex>k</Tex>: how far its eigenvalues <Tex>{t`\lambda_i`}</Tex> have moved from the ideal <Tex>{t`\mu_i`}</Tex>, matched so that the sum of squared distances is least. To first order it is the entanglement infidelity.</p>
      </Definition>
      <Definition id="angle-error" title="Angle error" direction="Nearer to zero is better; in radians, above zero turns too far" formula="angle">
        <p>Of a gate that is one rotation. <Tex>{t`\mu`}</Tex> is the ideal eigenvalue of greatest imaginary part and <Tex>m</Tex> counts how often it occurs. A gate that turns nothing, such as the identity, has no angle error.</p>
      </Definition>
      <Definition id="readout-loss" title="Readout loss" direction="Lower is better; 0 is an ideal device" formula="readout">
        <p>What preparation and readout lose together, from the empty circuit.</p>
      </Definition>
      <Definition id="prediction-error" title="Prediction error" direction="Lower is better; never below what shot noise alone gives" formula="prediction">
        <p>The mean total variation distance between prediction and observed frequencies on the <Tex>n</Tex> sealed circuits. Beside it stand the same distance for the ideal model and the value that shot noise alone would give. The reference is drawn from the replicates: <Tex>{t`\varepsilon_b`}</Tex> is the distance of <Tex>{t`\hat p`}</Tex> to a draw of the same shots from <Tex>{t`\hat p_b`}</Tex>. The check passes inside the central 99 % of them; <PartLink id="run-sheets" /> says what is at stake.</p>
      </Definition>
      <Definition id="misfit" title="Misfit" direction="Near zero is good; a diagnostic, not a figure" formula="misfit">
        <p>What the estimate leaves over on the circuits it was made from, against a parametric bootstrap of the same (2000 replicates for one qubit, 200 for a pair), in standard deviations. High values speak of drift, leakage or crosstalk; very low ones of counts that scatter less than counts can.</p>
      </Definition>
      <p className="prose">Error maps and the smallest eigenvalue of a Choi matrix are shown too, but they are not figures: they depend on the gauge, and are given in the one of minimum norm.</p>
    </Part>
  );
}
