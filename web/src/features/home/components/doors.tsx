import { Link } from 'react-router-dom';
import { Section } from '#web/components/section.tsx';
import { isContributor, signInAddress, useMe } from '#web/lib/me.ts';

/** Where each kind of reader goes on. */
export function Doors() {
  const person = useMe();
  return (
    <Section title="What brings you" className="cols3 doors">
      <div><h3><Link to="/boards">You buy</Link></h3><p>Read figures of every provider made one way, each with its uncertainty and the terms it was taken on, and see what may not be concluded.</p></div>
      <div><h3><Link to="/method">You cite</Link></h3><p>Quote a version that will not move, with its exact data, its method and the digests to check them by.</p></div>
      <div><h3>{isContributor(person) ? <Link to="/desk">You measure</Link> : <a href={signInAddress('/desk')}>You measure</a>}</h3><p>Plan a run, see what certainty costs in shots, and get your dataset accepted. The format can be <Link to="/schema">tried here</Link> without an account.</p></div>
    </Section>
  );
}
