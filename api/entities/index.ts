import { ApiToken } from './api-token.ts';
import { AuditEvent } from './audit-event.ts';
import { IdempotencyKey } from './idempotency-key.ts';
import { JobRun } from './job-run.ts';
import { MailMessage } from './mail-message.ts';
import { Membership } from './membership.ts';
import { Organisation } from './organisation.ts';
import { RoleGrant } from './role-grant.ts';
import { User } from './user.ts';

/** Every entity, listed by hand so that a bundle needs no folder scan. */
export const entities = [User, Organisation, Membership, RoleGrant, ApiToken, AuditEvent, IdempotencyKey, JobRun, MailMessage];
