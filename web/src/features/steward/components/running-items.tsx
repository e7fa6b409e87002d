import type { CampaignView } from '#shared/contracts/campaigns.ts';
import { versionedAccessionOf } from '#shared/domain/ids.ts';
import { AccessionLink } from '#web/components/accession-link.tsx';
import { DataTable, type Column } from '#web/components/data-table.tsx';
import { Progress } from '#web/components/progress.tsx';

type Item = CampaignView['running'][number];
const nameOf = (i: Item): string => versionedAccessionOf(i.accession, i.version);

const columns: readonly Column<Item>[] = [
  { id: 'entry', header: 'Entry', rowHeader: true, nowrap: true, cell: (i) => <AccessionLink accession={i.accession} version={i.version} /> },
  { id: 'stage', header: 'Stage', cell: (i) => i.stage ?? 'beginning' },
  { id: 'share', header: 'How far', cell: (i) => <Progress value={i.fraction} label={`${nameOf(i)}, ${Math.round(100 * i.fraction)} per cent`} /> },
];

export function RunningItems({ items }: { items: readonly Item[] }) {
  return <DataTable caption="Entries being estimated now" captionHidden tight columns={columns} rows={items} rowKey={nameOf} />;
}
