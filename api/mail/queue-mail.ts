import type { EntityManager } from '@mikro-orm/postgresql';
import { MailMessage } from '#api/entities/mail-message.ts';
import type { Queue } from '#api/jobs/queue.ts';

export interface Mail {
  recipient: string;
  subject: string;
  body: string;
  /** What it is about: "submission", "S-000012". */
  topic: string;
  topicId: string;
}

/** One line, so that no one can add headers through a title. */
const oneLine = (text: string): string => text.replace(/\s+/g, ' ').trim();

/** Owes a message: written, and its delivery asked for, with the transaction that `em` is in. Outside of one it throws. */
export const queueMail = async (em: EntityManager, queue: Queue, now: Date, mail: Mail): Promise<void> => {
  em.create(MailMessage, { ...mail, subject: oneLine(mail.subject), queuedAt: now, sentAt: null, attempts: 0, lastError: null });
  await queue.send('deliver-mail', {}, { em });
};
