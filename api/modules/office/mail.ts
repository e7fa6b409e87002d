import type { EntityManager } from '@mikro-orm/postgresql';
import type { MailOverview } from '#shared/contracts/office.ts';
import { MailMessage } from '#api/entities/mail-message.ts';

const mostOwed = 100;
const mostSent = 30;

/** The outbox: what is owed, oldest first, then the last messages sent. Bodies stay in it: they are letters to others. */
export const readMail = async (em: EntityManager): Promise<MailOverview> => {
  const owed = await em.find(MailMessage, { sentAt: null }, { orderBy: { queuedAt: 'asc', id: 'asc' }, limit: mostOwed, exclude: ['body'] });
  const sent = await em.find(MailMessage, { sentAt: { $ne: null } }, { orderBy: { sentAt: 'desc', id: 'desc' }, limit: mostSent, exclude: ['body'] });
  return {
    waiting: await em.count(MailMessage, { sentAt: null }),
    failing: await em.count(MailMessage, { sentAt: null, attempts: { $gt: 0 } }),
    sent: await em.count(MailMessage, { sentAt: { $ne: null } }),
    items: [...owed, ...sent].map((m) => ({
      id: m.id, recipient: m.recipient, subject: m.subject, topic: m.topic, topicId: m.topicId, queuedAt: m.queuedAt.toISOString(), sentAt: m.sentAt?.toISOString() ?? null, attempts: m.attempts, lastError: m.lastError ?? null,
    })),
  };
};
