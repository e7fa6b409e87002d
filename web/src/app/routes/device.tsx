import { useQuery, type QueryClient } from '@tanstack/react-query';
import { Link, useParams, type LoaderFunctionArgs } from 'react-router-dom';
import type { Device } from '#shared/contracts/devices.ts';
import { formatCount } from '#shared/domain/format.ts';
import { BlankState, EmptyState } from '#web/components/blank-state.tsx';
import { Caution } from '#web/components/caution.tsx';
import { DemoNote } from '#web/components/demo.tsx';
import { Facts } from '#web/components/facts.tsx';
import { PageHead } from '#web/components/page-head.tsx';
import { Read } from '#web/components/read.tsx';
import { Section } from '#web/components/section.tsx';
import { Wrap } from '#web/components/wrap.tsx';
import { deviceQuery } from '#web/features/devices/api/devices.ts';
import { HistoryTable } from '#web/features/devices/components/history-table.tsx';
import { historyGroups } from '#web/features/devices/history-data.ts';
import { modalityWords } from '#web/lib/modality-words.ts';

export const loader = (queryClient: QueryClient) => ({ params }: LoaderFunctionArgs) => {
  void queryClient.prefetchQuery(deviceQuery(params.id ?? ''));
  return null;
};

function DevicePage({ device }: { device: Device }) {
  const groups = historyGroups(device.history);
  return (
    <>
      <PageHead above={<Link to="/devices">Devices</Link>} title={device.name}>
        <Facts items={[{ term: 'Provider', value: <Link to={`/find?q=${encodeURIComponent(device.provider.name)}`}>{device.provider.name}</Link> }, { term: 'Modality', value: modalityWords[device.modality] }, { term: 'Entries', value: formatCount(device.entries) }]} />
      </PageHead>
      {device.history.some((item) => item.demo) ? <div className="notices"><DemoNote some={device.history.some((item) => !item.demo)} /></div> : null}
      {groups.map((group) => (
        <Section key={group.gateClass} title={group.title} aside={<><Link to={`/boards/${group.gateClass}`}>Its board</Link>, <code>{group.gateClass}</code></>} className="flow">
          <HistoryTable group={group} device={device.name} />
          <p className="says">Each row is one entry, oldest run first, all on one axis. A change between two rows is not thereby shown to be real: the intervals of two entries are not the interval of their difference, and register and method may differ.</p>
        </Section>
      ))}
      {groups.length === 0 ? <Section title="Entries"><BlankState title="No public entry yet">Its first entry will stand here once a curator has accepted it.</BlankState></Section> : null}
      <Section title="How to read this"><Caution /></Section>
    </>
  );
}

export function Component() {
  const id = useParams().id ?? '';
  const query = useQuery(deviceQuery(id));
  return (
    <Wrap>
      {query.data ? null : <PageHead above={<Link to="/devices">Devices</Link>} title="Device" />}
      <Read level={2} query={query} what="The device" loading="Loading the device" missing={<EmptyState level={2} title="There is no such device" act={<Link className="btn" to="/devices">All devices</Link>}>{`No device has the address ${id}.`}</EmptyState>}>
        {(device) => <DevicePage device={device} />}
      </Read>
    </Wrap>
  );
}
