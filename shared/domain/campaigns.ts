/**
 * The life of a re-estimation campaign. It starts running; a steward may pause it, go on, cancel it, or have what failed
 * tried again; the registry ends it when nothing is left to do.
 */
export const campaignStates = ['running', 'paused', 'finished', 'cancelled'] as const;
export type CampaignState = (typeof campaignStates)[number];

export const campaignItemStates = ['waiting', 'queued', 'running', 'done', 'failed', 'skipped', 'cancelled'] as const;
export type CampaignItemState = (typeof campaignItemStates)[number];

export type CampaignMove = 'pause' | 'resume' | 'cancel' | 'retry';

interface Step {
  from: readonly CampaignState[];
  to: CampaignState;
}

export const campaignMoves: Readonly<Record<CampaignMove, Step>> = {
  pause: { from: ['running'], to: 'paused' },
  resume: { from: ['paused'], to: 'running' },
  cancel: { from: ['running', 'paused'], to: 'cancelled' },
  /** What failed waits again; a campaign that had ended because nothing else was left goes on. */
  retry: { from: ['running', 'finished'], to: 'running' },
};

export const campaignStateWords: Readonly<Record<CampaignState, string>> = { running: 'Running', paused: 'Paused', finished: 'Finished', cancelled: 'Cancelled' };

export const mayMoveCampaign = (move: CampaignMove, state: CampaignState): boolean => campaignMoves[move].from.includes(state);
