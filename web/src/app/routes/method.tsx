import { Link } from 'react-router-dom';
import { Ledger } from '#web/components/facts.tsx';
import { Message } from '#web/components/message.tsx';
import { PageHead } from '#web/components/page-head.tsx';
import { Section } from '#web/components/section.tsx';
import { Steps } from '#web/components/steps.tsx';
import { Wrap } from '#web/components/wrap.tsx';
import { figureDefinitions, literature } from '#web/features/method/figure-definitions.tsx';

const passes = [
  <p key="1"><b>Expand.</b> Every gate is written as (1 + E) times the ideal gate, preparation and readout as the ideal ones plus a change. The probability of each outcome of each circuit is then, to first order, linear in these errors; the coefficients form the design matrix C.</p>,
  <p key="2"><b>Invert.</b> The Moore–Penrose inverse C<sup>+</sup> gives the errors of smallest norm that explain the observed frequencies. All rows weigh the same. Nothing is tuned, nothing is started from a guess.</p>,
  <p key="3"><b>Repeat seven times.</b> The full product of the noisy gates replaces the first-order prediction and the same inverse corrects what is left over. After these eight passes the estimate counts as settled if the last pass moved the predictions by less than a tenth of shot noise.</p>,
  <p key="4"><b>Read out.</b> Figures are computed from the noisy gates. All of them are free of gauge: no choice of description that leaves every probability alone can alter them.</p>,
];

export function Component() {
  return (
    <Wrap>
      <PageHead above="Method M1" title="One fixed linear inverse" opening="Every dataset of every provider is estimated by exactly this procedure. It has no option, no tuning, no starting point and no optimiser, so that two figures differ only where the counts differ." />
      <Section title="What goes in" aside="Counts, and nothing else." className="flow">
        <p className="prose">A contributor runs random circuits of a gate class and counts outcomes. The ideal gates of the class are known; what the device really does is not. Preparation, gates and readout are estimated together, so that none has to be taken as perfect.</p>
        <p className="prose">One or two qubits are estimated jointly, crosstalk included. Larger registers are chained: each qubit first, then, these held fixed, the entangling gates of each pair.</p>
      </Section>
      <Section title="The estimate"><Steps wide items={passes} /></Section>
      <Section title="The figures" aside="Each is printed with its interval, its method version and its number of replicates."><Ledger items={figureDefinitions} /></Section>
      <Section title="Intervals" className="flow" notes={<p>A standard error is the spread of the replicates; two of its digits decide how many digits of a figure are printed.</p>}>
        <p className="prose">2 000 bootstrap replicates draw every circuit’s counts anew and repeat the estimate. Their quantiles are the 50, 80 and 95 % intervals; for output error and prediction error, which cannot fall below zero, the interval is reflected about the estimate and cut at zero.</p>
        <p className="prose">The random numbers follow from the content id of the dataset and the method version. The same file therefore gives the same figures and the same intervals, to the last digit, on any machine.</p>
      </Section>
      <Section title="Not determined" className="flow">
        <p className="prose">A set of gates cannot reveal everything about itself. What no circuit of the dataset can tell is printed as not determined, with the reason. It is not set to zero and not left out.</p>
        <p className="prose">A design is sound when its rank is the one that the gate class can reach, does not depend on where small singular values are cut, and its smallest singular value is at least a hundredth of the largest. Run sheets are drawn until they are sound.</p>
      </Section>
      <Section title="Sealed circuits" className="flow">
        <p className="prose">One circuit in five of a run sheet is kept out of the estimate. Which ones is fixed by a secret whose hash is printed on the sheet before the run and which is revealed when the entry is frozen. The estimate must predict them: its distance from the counts has to lie inside the central 99 % of what shot noise alone would give.</p>
        <p className="prose">Misfit asks the same of the circuits that were used: it compares what is left over with a parametric bootstrap. High values speak of drift, leakage or crosstalk; very low ones of counts that scatter less than counts can.</p>
      </Section>
      <Section title="Equal terms" className="flow">
        <p className="prose">An entry stands on a board if its class is a ranked one, its circuits are those of a run sheet, its design is sound, its estimate settled, its sealed check passed, and it is the newest of its device and register. Every other entry is public too, with the reason why it is not listed.</p>
        <p className="prose">Rows stand in the order of their estimates. Joint rank ranges at 95 % confidence are not published yet; until then the order says nothing about which device is better.</p>
      </Section>
      <Section title="Limits" className="flow">
        <Message kind="caution"><p>Figures hold for the qubits, gates and dates stated with them. They do not replace acceptance testing under a contract.</p></Message>
        <ul className="prose limits">
          <li>The expansion is sound while circuit length times error strength stays well below one; beyond, the passes do not settle and the entry says so.</li>
          <li>The model is Markovian and trace preserving. Leakage and drift are not in it; the misfit and the sealed circuits are there to show them.</li>
          <li>No positivity is forced. Small negative eigenvalues of the estimated maps are normal within noise.</li>
          <li>Figures beyond twice the longest circuit of the estimate are extrapolated and drawn dashed.</li>
          <li>For a gate set that is incomplete, predictions hold to first order only and are marked so.</li>
          <li>Whole-register predictions reach to eight qubits, with 200 replicates from five qubits on.</li>
        </ul>
      </Section>
      <Section title="Literature"><ul className="plainlist literature">{literature.map((line) => <li key={line}>{line}</li>)}</ul><p className="small quiet after">How to make the same figures yourself stands on every entry; the format of the data is on the <Link to="/schema">schema page</Link>.</p></Section>
    </Wrap>
  );
}
