import { Link } from 'react-router-dom';
import type { CampaignSummary } from '#shared/contracts/campaigns.ts';
import { campaignStateWords } from '#shared/domain/campaigns.ts';
import { EmptyState } from '#web/components/blank-state.tsx';
import { DataTable, type Column } from '#web/components/data-table.tsx';
import { When } from '#web/components/when.tsx';
import { countWords } from '../campaign-words.ts';

const columns: readonly Column<CampaignSummary>[] = [
  { id: 'id', header: 'Campaign', rowHeader: true, nowrap: true, cell: (c) => <Link to={`/steward/campaigns/${c.id}`}>{c.id}</Link> },
  { id: 'method', header: 'Method', cell: (c) => c.method },
  { id: 'state', header: 'State', cell: (c) => campaignStateWords[c.state] },
  { id: 'progress', header: 'How far', cell: (c) => countWords(c.counts) },
  { id: 'by', header: 'Started', cell: (c) => <><When at={c.startedAt} />, {c.startedBy}</> },
];

export function CampaignList({ campaigns }: { campaigns: readonly CampaignSummary[] }) {
  if (campaigns.length === 0) return <EmptyState title="No campaign yet">A campaign shows, entry by entry, what a change of the method would do before it becomes official.</EmptyState>;
  return <DataTable caption="Campaigns" captionHidden columns={columns} rows={campaigns} rowKey={(c) => c.id} />;
}
