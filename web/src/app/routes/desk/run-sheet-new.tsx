import { useQuery } from '@tanstack/react-query';
import { Link } from 'react-router-dom';
import { PageHead } from '#web/components/page-head.tsx';
import { Read } from '#web/components/read.tsx';
import { Wrap } from '#web/components/wrap.tsx';
import { ownDevicesQuery } from '#web/features/desk/api/own-devices.ts';
import { AddDevice } from '#web/features/desk/components/add-device.tsx';
import { gateClassesQuery } from '#web/features/run-sheets/api/gate-classes.ts';
import { PlanForm } from '#web/features/run-sheets/components/plan-form.tsx';
import { useDesk } from './contributor.tsx';

function NewRunSheet() {
  const { organisation } = useDesk();
  const devices = useQuery(ownDevicesQuery(organisation.id));
  const classes = useQuery(gateClassesQuery());
  return (
    <Wrap>
      <PageHead slim above={<Link to="/desk/run-sheets">Run sheets</Link>} title="Plan a run sheet" />
      <Read level={2} query={classes} what="The list of gate classes" loading="Loading the gate classes" rows={4}>
        {(known) => (
          <Read level={2} query={devices} what="The list of devices" loading="Loading your devices" rows={4}>
            {(own) => <PlanForm key={organisation.id} devices={own.items} classes={known.items} addDevice={(done) => <AddDevice organisation={organisation.id} {...done} />} />}
          </Read>
        )}
      </Read>
    </Wrap>
  );
}

export { NewRunSheet as Component };
