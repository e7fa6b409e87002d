import { useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import type { DeviceSummary } from '#shared/contracts/devices.ts';
import { Message } from '#web/components/message.tsx';
import { PageHead } from '#web/components/page-head.tsx';
import { Read } from '#web/components/read.tsx';
import { Section } from '#web/components/section.tsx';
import { Wrap } from '#web/components/wrap.tsx';
import { ownDevicesQuery } from '#web/features/desk/api/own-devices.ts';
import { AddDevice } from '#web/features/desk/components/add-device.tsx';
import { DeviceList } from '#web/features/desk/components/device-list.tsx';
import { useDesk } from './contributor.tsx';

function OwnDevices() {
  const { organisation } = useDesk();
  const devices = useQuery(ownDevicesQuery(organisation.id));
  const [added, setAdded] = useState<DeviceSummary | null>(null);
  return (
    <Wrap>
      <PageHead slim title="Devices" tab={`Devices of ${organisation.name}`} />
      <Section title="Registered" aside={`Of ${organisation.name}`}>
        <Read query={devices} what="The list of devices" loading="Loading the devices">{({ items }) => <DeviceList devices={items} />}</Read>
      </Section>
      <Section title="New device" aside="A name is never reused.">
        <div className="flow">
          {added ? <Message kind="done" live>{added.name} is registered.</Message> : null}
          <AddDevice organisation={organisation.id} onAdded={setAdded} />
        </div>
      </Section>
    </Wrap>
  );
}

export { OwnDevices as Component };
