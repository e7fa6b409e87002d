import { useQuery } from '@tanstack/react-query';
import { Link } from 'react-router-dom';
import { ButtonLink } from '#web/components/button.tsx';
import { PageHead } from '#web/components/page-head.tsx';
import { Read } from '#web/components/read.tsx';
import { Section } from '#web/components/section.tsx';
import { Wrap } from '#web/components/wrap.tsx';
import { ownDevicesQuery } from '#web/features/desk/api/own-devices.ts';
import { DeviceList } from '#web/features/desk/components/device-list.tsx';
import { runSheetsQuery } from '#web/features/run-sheets/api/run-sheets.ts';
import { SheetList } from '#web/features/run-sheets/components/sheet-list.tsx';
import { FirstSteps } from '#web/features/desk/components/first-steps.tsx';
import { submissionsQuery } from '#web/features/submissions/api/submissions.ts';
import { SubmissionList } from '#web/features/submissions/components/submission-list.tsx';
import { useDesk } from './contributor.tsx';

const shown = 5;

/** The latest of everything, and the way to the rest. */
function DeskHome() {
  const { organisation } = useDesk();
  const submissions = useQuery(submissionsQuery(organisation.id));
  const sheets = useQuery(runSheetsQuery(organisation.id));
  const devices = useQuery(ownDevicesQuery(organisation.id));
  const bare = [submissions, sheets, devices].every((read) => read.data?.items.length === 0);
  return (
    <Wrap>
      <PageHead slim title="Desk" opening={`Run sheets, submissions and devices of ${organisation.name}.`}>
        {bare ? null : <p className="acts headacts"><ButtonLink kind="first" to="/desk/run-sheets/new">Plan a run sheet</ButtonLink><ButtonLink to="/desk/submissions/new">Submit a dataset</ButtonLink></p>}
      </PageHead>
      {bare ? <Section title="First steps"><FirstSteps /></Section> : <>
      <Section title="Submissions" aside={<Link to="/desk/submissions">All submissions</Link>}>
        <Read query={submissions} what="The list of submissions" loading="Loading the submissions">{({ items }) => <SubmissionList submissions={items.slice(0, shown)} />}</Read>
      </Section>
      <Section title="Run sheets" aside={<Link to="/desk/run-sheets">All run sheets</Link>}>
        <Read query={sheets} what="The list of run sheets" loading="Loading the run sheets">{({ items }) => <SheetList sheets={items.slice(0, shown)} />}</Read>
      </Section>
      <Section title="Devices" aside={<Link to="/desk/devices">All devices</Link>}>
        <Read query={devices} what="The list of devices" loading="Loading the devices">{({ items }) => <DeviceList elsewhere devices={items.slice(0, shown)} />}</Read>
      </Section>
      </>}
    </Wrap>
  );
}

export { DeskHome as Component };
