import { Link } from 'react-router-dom';
import type { DeviceSummary } from '#shared/contracts/devices.ts';
import { capitalise } from '#shared/domain/format.ts';
import { EmptyState } from '#web/components/blank-state.tsx';
import { ButtonLink } from '#web/components/button.tsx';
import { DataTable, type Column } from '#web/components/data-table.tsx';
import { When } from '#web/components/when.tsx';
import { modalityWords } from '#web/lib/modality-words.ts';

const columns: readonly Column<DeviceSummary>[] = [
  { id: 'name', header: 'Device', rowHeader: true, nowrap: true, cell: (d) => <Link to={`/devices/${d.id}`}>{d.name}</Link>, sortBy: (d) => d.name },
  { id: 'provider', header: 'Provider', cell: (d) => d.provider.name, sortBy: (d) => d.provider.name },
  { id: 'modality', header: 'Kind', cell: (d) => capitalise(modalityWords[d.modality]), sortBy: (d) => modalityWords[d.modality] },
  { id: 'entries', header: 'Entries', numeric: true, cell: (d) => d.entries, sortBy: (d) => d.entries },
  { id: 'last', header: 'Last entry', nowrap: true, cell: (d) => (d.lastEntryAt ? <When at={d.lastEntryAt} /> : 'none yet'), sortBy: (d) => d.lastEntryAt },
];

/** The devices of an organisation. `elsewhere`: the form that adds one is on another page. */
export function DeviceList({ devices, elsewhere = false }: { devices: readonly DeviceSummary[]; elsewhere?: boolean }) {
  if (devices.length === 0) {
    return (
      <EmptyState title="No device yet" act={elsewhere ? <ButtonLink to="/desk/devices">Add a device</ButtonLink> : undefined}>
        {`A device is named once; run sheets and entries then belong to it.${elsewhere ? '' : ' Add the first one below.'}`}
      </EmptyState>
    );
  }
  return <DataTable caption="Devices" captionHidden columns={columns} rows={devices} rowKey={(d) => d.id} />;
}
