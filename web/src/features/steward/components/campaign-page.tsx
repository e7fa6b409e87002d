import { useQuery } from '@tanstack/react-query';
import { Link } from 'react-router-dom';
import type { CampaignView } from '#shared/contracts/campaigns.ts';
import { campaignStateWords } from '#shared/domain/campaigns.ts';
import { ButtonLink } from '#web/components/button.tsx';
import { EmptyState } from '#web/components/blank-state.tsx';
import { Facts } from '#web/components/facts.tsx';
import { PageHead } from '#web/components/page-head.tsx';
import { Progress } from '#web/components/progress.tsx';
import { Read } from '#web/components/read.tsx';
import { Section } from '#web/components/section.tsx';
import { When } from '#web/components/when.tsx';
import { Wrap } from '#web/components/wrap.tsx';
import { campaignQuery } from '../api/campaigns.ts';
import { countWords, ended, standingWords } from '../campaign-words.ts';
import { CampaignActs } from './campaign-acts.tsx';
import { CampaignProblems } from './campaign-problems.tsx';
import { RunningItems } from './running-items.tsx';

/** One campaign: how far it is, what may be done with it, what runs now, and what went wrong. */
export function CampaignPage({ id }: { id: string }) {
  const query = useQuery(campaignQuery(id));
  return (
    <Wrap>
      <PageHead slim above={<Link to="/steward/campaigns">Methods and campaigns</Link>} title={`Campaign ${id}`}>{query.data ? <CampaignFacts campaign={query.data} /> : null}</PageHead>
      <Read level={2} query={query} what="The campaign" loading="Loading the campaign"
        missing={<EmptyState level={2} title="There is no such campaign" act={<ButtonLink to="/steward/campaigns">All campaigns</ButtonLink>}>{`No campaign has the number ${id}.`}</EmptyState>}>
        {(campaign) => <Whole campaign={campaign} />}
      </Read>
    </Wrap>
  );
}

function CampaignFacts({ campaign: { method, state, startedAt, startedBy, endedAt } }: { campaign: CampaignView }) {
  return (
    <Facts items={[
      { term: 'Method version', value: method },
      { term: 'State', value: campaignStateWords[state] },
      { term: 'Started', value: <><When at={startedAt} exact />, {startedBy}</> },
      ...(endedAt ? [{ term: 'Ended', value: <When at={endedAt} exact /> }] : []),
    ]} />
  );
}

function Whole({ campaign }: { campaign: CampaignView }) {
  const { counts, running, problems } = campaign;
  return (
    <>
      <Section title="Progress">
        <div className="recordform">
          <Progress value={counts.total === 0 ? 1 : ended(counts) / counts.total} label={countWords(counts)} />
          <p>{countWords(counts)}.</p>
          <p role="status">{standingWords(campaign)}</p>
          <CampaignActs campaign={campaign} />
        </div>
      </Section>
      {running.length > 0 ? <Section title="Running now"><RunningItems items={running} /></Section> : null}
      {problems.length > 0 ? <Section title="Failed or left out"><CampaignProblems problems={problems} /></Section> : null}
    </>
  );
}
