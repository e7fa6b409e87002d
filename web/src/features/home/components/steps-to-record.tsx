import { Section } from '#web/components/section.tsx';
import { Steps } from '#web/components/steps.tsx';

const steps = [
  <p key="1"><b>Draw a run sheet.</b> The registry draws random circuits for a gate class and says how narrow the intervals will be before a shot is taken. One circuit in five is sealed.</p>,
  <p key="2"><b>Run it and send the counts.</b> One open JSON file, checked in your browser before it leaves.</p>,
  <p key="3"><b>One estimate for all.</b> The same linear method for every provider, with no options and nothing to tune. What the data cannot determine is printed as not determined.</p>,
  <p key="4"><b>Tested on sealed circuits.</b> The estimate must predict circuits that it has never seen.</p>,
  <p key="5"><b>Reviewed, then frozen.</b> A curator of another organisation decides. A frozen version never changes; a mistake is answered by a new version or a withdrawal with its reason.</p>,
];

export function StepsToRecord() {
  return <Section title="From counts to record"><Steps wide items={steps} /></Section>;
}
