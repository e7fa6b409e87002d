import { createTransport } from 'nodemailer';
import { MailMessage } from '#api/entities/mail-message.ts';
import { defineJob } from '#api/jobs/define-job.ts';

/** Messages sent in one run; more wait for the next. */
const batch = 50;

/** Sends what is owed, oldest first. Each message is locked while it is sent, so two workers never send it both. */
export const deliverMailJob = defineJob({
  name: 'deliver-mail',
  // Also by itself, for messages whose job was given up while the mail server was away.
  schedule: '*/5 * * * *',
  handle: async ({ em, deps, signal }) => {
    const transport = createTransport(deps.config.smtpUrl);
    const faults: string[] = [];
    try {
      const owed = await em.find(MailMessage, { sentAt: null }, { orderBy: { queuedAt: 'asc', id: 'asc' }, limit: batch, fields: ['id'] });
      for (const { id } of owed) {
        signal.throwIfAborted();
        await em.fork().transactional(async (tx) => {
          const [locked] = await tx.execute<{ id: string }[]>('select id from mail_outbox where id = ? and sent_at is null for update skip locked', [id]);
          if (!locked) return;
          const message = await tx.findOneOrFail(MailMessage, { id });
          message.attempts += 1;
          try {
            // The id makes a repeat recognisable, should the worker die between sending and noting it.
            await transport.sendMail({ from: deps.config.mailFrom, to: message.recipient, subject: message.subject, text: message.body, messageId: `<${message.id}@${new URL(deps.config.publicUrl).hostname}>` });
            message.sentAt = deps.clock.now();
            message.lastError = null;
          } catch (fault) {
            message.lastError = fault instanceof Error ? fault.message : String(fault);
            faults.push(`${message.id}: ${message.lastError}`);
          }
        });
      }
    } finally {
      transport.close();
    }
    if (faults.length > 0) throw new Error(`${faults.length} of the messages could not be sent: ${faults[0]}`);
  },
});
