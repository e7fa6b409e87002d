import { ApiToken } from './api-token.ts';
import { AuditEvent } from './audit-event.ts';
import { Campaign } from './campaign.ts';
import { Decision } from './decision.ts';
import { Device } from './device.ts';
import { EntryStateRow } from './entry-state.ts';
import { EntryVersion } from './entry-version.ts';
import { IdempotencyKey } from './idempotency-key.ts';
import { JobRun } from './job-run.ts';
import { MailMessage } from './mail-message.ts';
import { Membership } from './membership.ts';
import { Organisation } from './organisation.ts';
import { RoleGrant } from './role-grant.ts';
import { RunSheet } from './run-sheet.ts';
import { SecondOpinion } from './second-opinion.ts';
import { SubmissionEstimate } from './submission-estimate.ts';
import { SubmissionFile } from './submission-file.ts';
import { SubmissionMessage } from './submission-message.ts';
import { SubmissionMove } from './submission-move.ts';
import { Submission } from './submission.ts';
import { User } from './user.ts';

/** Every entity, listed by hand so that a bundle needs no folder scan. */
export const entities = [
  User, Organisation, Membership, RoleGrant, ApiToken, AuditEvent, IdempotencyKey, JobRun, MailMessage,
  Device, RunSheet, Submission, SubmissionFile, SubmissionEstimate, SecondOpinion, SubmissionMove, SubmissionMessage, Decision, EntryVersion, EntryStateRow, Campaign,
];
