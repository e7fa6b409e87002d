import { lazy, Suspense, type ComponentType } from 'react';
import { LoadingFrame } from '#web/components/loading-frame.tsx';
import { Part, PartLink } from '../components/part.tsx';

// The studies are large and wanted here alone: they come after the page.
const DomainView = lazy(() => import('../studies/domain-view.tsx'));
const CoverageView = lazy(() => import('../studies/coverage-view.tsx'));
const RankView = lazy(() => import('../studies/rank-view.tsx'));

/** `room` is about what the study takes, so that the page below does not jump. */
function Study({ view: View, label, room }: { view: ComponentType; label: string; room: string }) {
  return <Suspense fallback={<div className={room}><LoadingFrame label={label} rows={4} /></div>}><View /></Suspense>;
}

export function Domain() {
  return (
    <Part id="domain" aside="Where the intervals were shown to hold, for each figure by itself.">
      <p className="prose">An interval at 95 % is worth its name only where it holds the truth in about 95 of 100 cases. A cell of the coverage study, that is one gate class at one strength of noise, one coherent share and one number of shots, lies inside the domain of a figure if the 99 % Wilson interval of its measured coverage meets 93 to 97 %, counted over the trials that settled, since only settled entries are ranked. The domain is kept for each figure, since a board needs only its own figure to lie inside. An entry is placed in it by its gate loss (the upper end of the 95 % interval, for its worst gate), its shots and the depth of the figure.</p>
      <p className="prose">An entry outside the domain of a figure is not ranked by it, and says so. It may stand on the board of another.</p>
      <Study view={DomainView} label="Loading the domain" room="studyroom" />
    </Part>
  );
}

export function Coverage() {
  return (
    <Part id="coverage" aside="Nominal against actual.">
      <p className="prose">Devices of known truth are simulated, their counts estimated as any other, and it is counted how often each interval holds the truth: over gate classes, strength of noise, coherent share and shots. The seeds were fixed before the first run, and every cell is shown, also where a figure misses; <PartLink id="domain" /> says what follows from it.</p>
      <Study view={CoverageView} label="Loading the coverage study" room="studyroom tall" />
    </Part>
  );
}

export function RankStudy() {
  return (
    <Part id="rank-study" aside="How often all rank ranges of a board hold at once.">
      <p className="prose">Boards of known truth are drawn in several scenarios, among them devices that are all equal and devices measured with unequal shots, and it is counted how often the rank ranges of <em>all</em> entries hold their true ranks at the same time. Equal devices share every rank between them: each of these is true.</p>
      <Study view={RankView} label="Loading the rank study" room="studyroom" />
    </Part>
  );
}
