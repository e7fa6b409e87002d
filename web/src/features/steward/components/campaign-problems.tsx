import type { CampaignView } from '#shared/contracts/campaigns.ts';
import { versionedAccessionOf } from '#shared/domain/ids.ts';
import { AccessionLink } from '#web/components/accession-link.tsx';
import { DataTable, type Column } from '#web/components/data-table.tsx';
import { When } from '#web/components/when.tsx';

type Problem = CampaignView['problems'][number];

const columns: readonly Column<Problem>[] = [
  { id: 'entry', header: 'Entry', rowHeader: true, nowrap: true, cell: (p) => <AccessionLink accession={p.accession} version={p.version} /> },
  { id: 'what', header: 'What', cell: (p) => (p.state === 'failed' ? 'Failed' : 'Left out') },
  { id: 'reason', header: 'Reason', cell: (p) => p.reason },
  { id: 'attempts', header: 'Attempts', numeric: true, cell: (p) => p.attempts },
  { id: 'at', header: 'At', nowrap: true, cell: (p) => <When at={p.at} exact /> },
];

export function CampaignProblems({ problems }: { problems: readonly Problem[] }) {
  return <DataTable caption="Entries without a result, with the reason" captionHidden columns={columns} rows={problems} rowKey={(p) => versionedAccessionOf(p.accession, p.version)} />;
}
