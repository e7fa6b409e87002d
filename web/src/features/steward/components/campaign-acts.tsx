import { useMutation, useQueryClient } from '@tanstack/react-query';
import type { CampaignView } from '#shared/contracts/campaigns.ts';
import { mayMoveCampaign, type CampaignMove } from '#shared/domain/campaigns.ts';
import { plural } from '#shared/domain/format.ts';
import { Button } from '#web/components/button.tsx';
import { Confirm } from '#web/components/confirm.tsx';
import { Message } from '#web/components/message.tsx';
import { asApiError } from '#web/lib/api-error.ts';
import { campaignQuery, campaignsQuery, moveCampaign } from '../api/campaigns.ts';

/** What may be done with a campaign in its state; nothing is offered that the registry would refuse. */
export function CampaignActs({ campaign }: { campaign: CampaignView }) {
  const { id, state, counts } = campaign;
  const client = useQueryClient();
  const move = useMutation({
    mutationFn: (which: CampaignMove) => moveCampaign(id, which),
    onSuccess: async (fresh) => {
      client.setQueryData(campaignQuery(id).queryKey, fresh);
      await client.invalidateQueries({ queryKey: campaignsQuery().queryKey });
    },
    // Somebody else, or the campaign itself, may have moved it: the page shows what is.
    onError: () => client.invalidateQueries({ queryKey: campaignQuery(id).queryKey }),
  });
  const busy = (which: CampaignMove): boolean => move.isPending && move.variables === which;
  return (
    <>
      <div className="acts">
        {mayMoveCampaign('pause', state) ? <Button busy={busy('pause')} onClick={() => move.mutate('pause')}>Pause</Button> : null}
        {mayMoveCampaign('resume', state) ? <Button kind="first" busy={busy('resume')} onClick={() => move.mutate('resume')}>Go on</Button> : null}
        {mayMoveCampaign('retry', state) && counts.failed > 0 ? <Button busy={busy('retry')} onClick={() => move.mutate('retry')}>{`Try the ${counts.failed} failed ${plural(counts.failed, 'one')} again`}</Button> : null}
        {mayMoveCampaign('cancel', state) ? (
          <Confirm ask="Cancel this campaign" act="Yes, cancel it" busy={busy('cancel')} onConfirm={() => move.mutate('cancel')}>
            What waits is not estimated. Results that are there stay. A later campaign with the same version takes up only what is missing.
          </Confirm>
        ) : null}
      </div>
      {move.isError ? <Message kind="fault" live>{asApiError(move.error).message}</Message> : null}
    </>
  );
}
