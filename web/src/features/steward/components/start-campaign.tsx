import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import { useNavigate } from 'react-router-dom';
import type { MethodView } from '#shared/contracts/methods.ts';
import { Confirm } from '#web/components/confirm.tsx';
import { Message } from '#web/components/message.tsx';
import { Read } from '#web/components/read.tsx';
import { Select } from '#web/components/select.tsx';
import { asApiError } from '#web/lib/api-error.ts';
import { campaignPlanQuery, campaignsQuery, startCampaign } from '../api/campaigns.ts';
import { planWords } from '../campaign-words.ts';

/** Choice of a method version, what a campaign with it would do, and its start. */
export function StartCampaign({ methods }: { methods: readonly MethodView[] }) {
  const client = useQueryClient();
  const go = useNavigate();
  const [method, setMethod] = useState((methods.find((m) => m.status === 'draft') ?? methods[0])?.id ?? '');
  const plan = useQuery(campaignPlanQuery(method));
  const start = useMutation({
    mutationFn: startCampaign,
    onSuccess: async ({ id }) => {
      await client.invalidateQueries({ queryKey: campaignsQuery().queryKey });
      await go(`/steward/campaigns/${id}`);
    },
  });
  return (
    <div className="recordform">
      <Select label="Method version" value={method} options={methods.map((m) => ({ value: m.id, label: `${m.id}, ${m.status}` }))} onChange={(e) => { setMethod(e.target.value); start.reset(); }} />
      <Read query={plan} what="What it would do" loading="Counting the entries" rows={1}>
        {(found) => (
          <>
            {planWords(found).map((sentence) => <p key={sentence}>{sentence}</p>)}
            {found.toEstimate > 0 ? (
              <Confirm ask={`Start a campaign with ${found.method}`} act="Yes, start it" keep="Not now" busy={start.isPending} onConfirm={() => start.mutate(found.method)}>
                <p>Each result is added beside the frozen one and stays: it can never be changed or taken away. The campaign itself can be paused, resumed or cancelled.</p>
              </Confirm>
            ) : null}
          </>
        )}
      </Read>
      {start.isError ? <Message kind="fault" live>{asApiError(start.error).message}</Message> : null}
    </div>
  );
}
