import { deliverMailJob } from '#api/mail/deliver-mail.ts';
import { advanceCampaignsJob } from './advance-campaigns.ts';
import type { Job } from './define-job.ts';
import { drawSheetJob } from './draw-sheet.ts';
import { estimateJob } from './estimate.ts';
import { houseKeepingJob } from './house-keeping.ts';
import { liftEmbargoesJob } from './lift-embargoes.ts';
import { opinionsJob } from './opinions.ts';
import { registerDoisJob } from './register-dois.ts';
import { reEstimateJob } from './re-estimate.ts';

/** Every kind of job that a worker takes. */
export const allJobs: readonly Job[] = [estimateJob, drawSheetJob, liftEmbargoesJob, deliverMailJob, reEstimateJob, advanceCampaignsJob, registerDoisJob, opinionsJob, houseKeepingJob];
