import { Formula, FormulaLink } from '../components/formula.tsx';
import { Part, PartLink } from '../components/part.tsx';
import { Tex } from '../components/tex.tsx';

const t = String.raw;

export function Purpose() {
  return (
    <Part id="purpose">
      <p className="prose">A gate figure is of use only if it means the same for every device. Evenbeam therefore estimates every dataset by the procedure on this page and by no other. It takes the counts of random circuits and the ideal gates of the gate class; it estimates preparation, gates and readout together, so that none of them has to be taken as perfect; it has no option, no tuning, no starting point and no optimiser. Its answer is a set of figures with intervals, and for everything the counts cannot tell, the statement that they cannot. The same file gives the same digits on any machine.</p>
    </Part>
  );
}

export function Representation() {
  return (
    <Part id="representation" aside="States, effects and gates as real vectors and matrices.">
      <p className="prose">For <Tex>n</Tex> qubits let <Tex>d = 2^n</Tex> and <Tex>D = d^2 = 4^n</Tex>. States and effects are written in the normalised Pauli basis <Tex>{t`P_a/\sqrt d`}</Tex>, in the order I, X, Y, Z for each qubit, the first qubit slowest; a gate is its Pauli transfer matrix, real and <Tex>{t`D \times D`}</Tex>. For a unitary gate <Tex>U</Tex>:</p>
      <Formula id="vectors" />
      <p className="prose">The probability of outcome <Tex>o</Tex> after the circuit <Tex>{t`g_1 \ldots g_L`}</Tex> is a plain product of these:</p>
      <Formula id="product" />
      <p className="prose">Ideally the device starts in <Tex>{t`|0\cdots0\rangle`}</Tex> and each effect is <Tex>{t`|o\rangle\langle o|`}</Tex>. Outcomes are bit strings in ascending order; their leftmost character belongs to the first qubit.</p>
    </Part>
  );
}

export function Parameters() {
  return (
    <Part id="parameters" aside="Trace preserving by construction.">
      <p className="prose">Every gate of the device is written as an error map after the ideal gate, preparation and readout as the ideal ones plus a change:</p>
      <Formula id="errors" />
      <p className="prose">The first row of each <Tex>E_k</Tex> and the first component of <Tex>{t`\delta\rho`}</Tex> are zero, which keeps every trace, and the effects always add up to certainty: the last one is the complement of the others. With <Tex>K</Tex> gates that leaves</p>
      <Formula id="columns" />
      <p className="prose">parameters, in this order: the gates, row by row; the preparation; the first <Tex>d - 1</Tex> effects. Every row of the data weighs the same, whatever its shots.</p>
      <p className="prose">One or two qubits are estimated <em>jointly</em>: each gate has an error map on the whole register, crosstalk included. Larger registers are <em>chained</em>, as <PartLink id="chained" /> says.</p>
    </Part>
  );
}

export function Design() {
  return (
    <Part id="design" aside="How each probability moves with each parameter.">
      <p className="prose">Along a circuit let the state after <Tex>j</Tex> ideal gates and the effect carried back to that place be</p>
      <Formula id="steps" />
      <p className="prose">To first order in the errors every probability is linear in the parameters, and its derivatives at the ideal gates are products of these:</p>
      <Formula id="row" />
      <p className="prose">One such row for each circuit and each outcome but the last makes the design matrix <Tex>C</Tex>. It follows from the circuits and the ideal gates alone: it is known before a shot is taken, and so is the standard error of every figure, by <FormulaLink id="linear-error" />.</p>
    </Part>
  );
}
