import type { MigrationObject } from '@mikro-orm/core';
import { Migration0001Base } from './0001-base.ts';
import { Migration0002Record } from './0002-record.ts';
import { Migration0003DesignFactors } from './0003-design-factors.ts';
import { Migration0004SecondOpinions } from './0004-second-opinions.ts';
import { Migration0005MethodCampaigns } from './0005-method-campaigns.ts';
import { Migration0006Log } from './0006-log.ts';
import { Migration0007DoiOutbox } from './0007-doi-outbox.ts';
import { Migration0008Withdrawals } from './0008-withdrawals.ts';

/** Every migration in order, listed by hand so that a bundle needs no folder scan. A released one is never edited. */
export const migrations: MigrationObject[] = [
  { name: '0001-base', class: Migration0001Base },
  { name: '0002-record', class: Migration0002Record },
  { name: '0003-design-factors', class: Migration0003DesignFactors },
  { name: '0004-second-opinions', class: Migration0004SecondOpinions },
  { name: '0005-method-campaigns', class: Migration0005MethodCampaigns },
  { name: '0006-log', class: Migration0006Log },
  { name: '0007-doi-outbox', class: Migration0007DoiOutbox },
  { name: '0008-withdrawals', class: Migration0008Withdrawals },
];
