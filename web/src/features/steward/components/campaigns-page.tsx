import { useQuery } from '@tanstack/react-query';
import { PageHead } from '#web/components/page-head.tsx';
import { Read } from '#web/components/read.tsx';
import { Section } from '#web/components/section.tsx';
import { Wrap } from '#web/components/wrap.tsx';
import { campaignsQuery, methodsQuery } from '../api/campaigns.ts';
import { CampaignList } from './campaign-list.tsx';
import { MethodsTable } from './methods-table.tsx';
import { StartCampaign } from './start-campaign.tsx';

export function CampaignsPage() {
  const methods = useQuery(methodsQuery());
  const campaigns = useQuery(campaignsQuery());
  return (
    <Wrap>
      <PageHead slim title="Methods and campaigns" />
      <Section title="Versions">
        <Read query={methods} what="The list of method versions" loading="Loading the method versions" rows={2}>{({ items }) => <MethodsTable methods={items} />}</Read>
      </Section>
      <Section title="Campaigns" aside="Newest first">
        <Read query={campaigns} what="The list of campaigns" loading="Loading the campaigns" rows={2}>{({ items }) => <CampaignList campaigns={items} />}</Read>
      </Section>
      <Section title="New campaign" notes={<>
        <p><strong>What it is for.</strong> Every public entry is estimated again with another method version, from its stored dataset and revealed seal.</p>
        <p><strong>What it does not do.</strong> Frozen results stay as they are. A draft’s figures are shown apart from them, and nothing is ranked by a draft.</p>
        <p><strong>What comes first.</strong> Estimates and run sheets of contributors. While any of them waits or runs, a campaign hands out nothing.</p>
      </>}>
        <Read query={methods} what="The list of method versions" loading="Loading the method versions" rows={2}>{({ items }) => <StartCampaign methods={items} />}</Read>
      </Section>
    </Wrap>
  );
}
