import { useParams } from 'react-router-dom';
import { CampaignPage } from '#web/features/steward/components/campaign-page.tsx';

export function Component() {
  const { id = '' } = useParams();
  return <CampaignPage key={id} id={id} />;
}
