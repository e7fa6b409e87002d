import { useQuery, type QueryClient } from '@tanstack/react-query';
import { useSearchParams, type LoaderFunctionArgs } from 'react-router-dom';
import { BlankState } from '#web/components/blank-state.tsx';
import { ButtonLink } from '#web/components/button.tsx';
import { DemoNote } from '#web/components/demo.tsx';
import { PageHead } from '#web/components/page-head.tsx';
import { Read } from '#web/components/read.tsx';
import { Section } from '#web/components/section.tsx';
import { Wrap } from '#web/components/wrap.tsx';
import { deviceListQuery } from '#web/features/devices/api/devices.ts';
import { DeviceTable } from '#web/features/devices/components/device-table.tsx';

export const loader = (queryClient: QueryClient) => ({ request }: LoaderFunctionArgs) => {
  void queryClient.prefetchQuery(deviceListQuery(new URL(request.url).searchParams.get('cursor') ?? undefined));
  return null;
};

export function Component() {
  const [search] = useSearchParams();
  const query = useQuery(deviceListQuery(search.get('cursor') ?? undefined));
  return (
    <Wrap>
      <PageHead title="Devices" opening="Every device with a public entry, and when the last one was frozen." />
      <Section title="All devices">
        <Read query={query} what="The list of devices" loading="Loading the devices" rows={6}>
          {(list) => list.items.length > 0
            ? <>{list.items.some((d) => d.demo) ? <div className="notices"><DemoNote some={list.items.some((d) => !d.demo)} /></div> : null}<DeviceTable devices={list.items} />{list.nextCursor ? <p className="more"><ButtonLink to={`/devices?${new URLSearchParams({ cursor: list.nextCursor })}`}>More devices</ButtonLink></p> : null}</>
            : <BlankState title="No device yet">A device stands here once its first entry is frozen.</BlankState>}
        </Read>
      </Section>
    </Wrap>
  );
}
