import { mkdtempSync, readdirSync, readFileSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { simpleParser } from 'mailparser';
import { afterEach, describe, expect, it, vi } from 'vitest';
import { MailMessage } from '#api/entities/mail-message.ts';
import { startMailStandIn } from '#api/fakes/mail/start.ts';
import { startWorker } from '#api/jobs/start-worker.ts';
import { systemClock } from '#api/lib/clock.ts';
import { deliverMailJob } from '#api/mail/deliver-mail.ts';
import { queueMail } from '#api/mail/queue-mail.ts';
import { useTestApp } from '#tests/support/test-app.ts';

const test = useTestApp({ faultsExpected: true });
const soon = { timeout: 60_000, interval: 50 };
const mail = { recipient: 'ida.marsh@larkspur.example', subject: 'Accepted:\r\nBcc: all@evenbeam.example', body: 'Ein Gruß — 96.95\u202f%', topic: 'submission', topicId: 'S-000012' };
let cleanUp: (() => Promise<void>)[] = [];
afterEach(async () => {
  for (const step of cleanUp.reverse()) await step();
  cleanUp = [];
});

const worker = async (smtpUrl: string): Promise<void> => {
  const running = await startWorker({ ...test().deps, clock: systemClock, config: { ...test().deps.config, smtpUrl } }, [deliverMailJob]);
  cleanUp.push(() => running.stop());
};

describe('mail that a move owes', () => {
  it('is not sent when the move is undone, arrives whole when it is not, and no header can be slipped in', async () => {
    const folder = mkdtempSync(join(tmpdir(), 'evenbeam-mail-'));
    cleanUp.push(async () => rmSync(folder, { recursive: true }));
    const { deps } = test();
    await expect(deps.orm.em.fork().transactional(async (tx) => {
      await queueMail(tx, deps.queue, deps.clock.now(), { ...mail, topicId: 'S-000011' });
      throw new Error('undone');
    })).rejects.toThrow('undone');
    await deps.orm.em.fork().transactional((tx) => queueMail(tx, deps.queue, deps.clock.now(), mail));
    const standIn = await startMailStandIn(folder);
    cleanUp.push(() => standIn.stop());
    await worker(standIn.url);
    await vi.waitFor(async () => expect((await deps.orm.em.fork().findOneOrFail(MailMessage, { topicId: 'S-000012' })).sentAt).not.toBeNull(), soon);
    const files = readdirSync(folder);
    expect(files).toHaveLength(1);
    const parsed = await simpleParser(readFileSync(join(folder, files[0] ?? '')));
    expect(parsed.subject).toBe('Accepted: Bcc: all@evenbeam.example');
    expect(parsed.bcc).toBeUndefined();
    expect(parsed.text?.trim()).toBe(mail.body);
    expect(await deps.orm.em.fork().count(MailMessage, {})).toBe(1);
  });

  it('stays owed, with the fault noted, while the mail server is away', async () => {
    const { deps } = test();
    await deps.orm.em.fork().transactional((tx) => queueMail(tx, deps.queue, deps.clock.now(), { ...mail, topicId: 'S-000013' }));
    await worker('smtp://127.0.0.1:9');
    await vi.waitFor(async () => expect(await deps.orm.em.fork().findOneOrFail(MailMessage, { topicId: 'S-000013' })).toMatchObject({ sentAt: null, lastError: expect.stringContaining('ECONNREFUSED') }), soon);
  });
});
