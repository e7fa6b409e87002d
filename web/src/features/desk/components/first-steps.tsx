import { Link } from 'react-router-dom';
import { ButtonLink } from '#web/components/button.tsx';
import { Steps } from '#web/components/steps.tsx';

/** What to do on an empty desk, in order. */
export function FirstSteps() {
  return (
    <div className="flow">
      <Steps wide items={[
        <p key="device"><Link to="/desk/devices">Add a device.</Link> It is named once; run sheets and entries then belong to it.</p>,
        <p key="sheet"><Link to="/desk/run-sheets/new">Plan a run sheet.</Link> It lists the circuits to run, and tells beforehand how narrow the intervals will be.</p>,
        <p key="file">Run the circuits on the device and <Link to="/desk/submissions/new">submit the raw counts</Link> in one file. It is checked in your browser first.</p>,
        <p key="review">Fill in the record and send it to review. A curator of another organisation reads it; what is accepted is frozen and public.</p>,
      ]} />
      <p className="acts"><ButtonLink kind="first" to="/desk/devices">Add a device</ButtonLink></p>
    </div>
  );
}
