import { defineEntity, p, type InferEntity } from '@mikro-orm/core';
import { instant, uuidKey } from './columns.ts';

/** A message owed: written in the transaction of the move that owes it, sent by the worker, kept afterwards. */
export const MailMessage = defineEntity({
  name: 'MailMessage',
  tableName: 'mail_outbox',
  properties: {
    id: uuidKey(),
    recipient: p.string(),
    subject: p.string(),
    body: p.text(),
    /** What the message is about: "submission", "S-000012". */
    topic: p.string(),
    topicId: p.string(),
    queuedAt: instant(),
    sentAt: instant().nullable(),
    attempts: p.integer().default(0),
    lastError: p.text().nullable(),
  },
});
export type MailMessage = InferEntity<typeof MailMessage>;
