import { interestMonths } from '#shared/domain/rules.ts';
import type { Move } from '#shared/domain/life-cycle.ts';
import type { Submission } from '#api/entities/submission.ts';
import { User } from '#api/entities/user.ts';
import { runSql } from '#api/lib/run-sql.ts';
import { queueMail } from '#api/mail/queue-mail.ts';
import type { Work } from '#api/lib/work.ts';

const toContributor = 'contributor';
const toCurators = 'curators';
const toClaimant = 'claimant';

interface Letter {
  to: typeof toContributor | typeof toCurators | typeof toClaimant;
  subject: (s: Submission) => string;
  body: (s: Submission, reason: string | null) => string;
}

const versionOf = (s: Submission): string => `${s.accession}.${s.version}`;
const because = (reason: string | null): string => (reason ? `\n\n${reason}` : '');

/** The letters that moves owe. A move that is not listed owes none. */
const letters: Partial<Record<Move, Letter>> = {
  block: { to: toContributor, subject: (s) => `${s.id} is blocked`, body: (s, reason) => `The registry checked "${s.title}" and cannot go on with it.${because(reason)}\n\nYou may send a corrected file for the same submission.` },
  pass: { to: toContributor, subject: (s) => `${s.id} is checked and estimated`, body: (s) => `"${s.title}" passed every blocking check. Look at the figures, complete the record and send it to review.` },
  send: { to: toCurators, subject: (s) => `${s.id} waits for review`, body: (s) => `"${s.title}" was sent to review.` },
  return: { to: toContributor, subject: (s) => `${s.id} was returned to you`, body: (s, reason) => `A curator returned "${s.title}" with this reason:${because(reason)}` },
  decline: { to: toContributor, subject: (s) => `${s.id} was declined`, body: (s, reason) => `A curator declined "${s.title}" with this reason:${because(reason)}` },
  accept: { to: toContributor, subject: (s) => `${s.id} was accepted`, body: (s, reason) => `A curator accepted "${s.title}":${because(reason)}` },
  embargo: { to: toContributor, subject: (s) => `${versionOf(s)} is under embargo`, body: (s) => `"${s.title}" is kept as ${versionOf(s)} and becomes public on ${s.embargoUntil}.` },
  freeze: { to: toContributor, subject: (s) => `${versionOf(s)} is frozen and public`, body: (s) => `"${s.title}" is public as ${versionOf(s)} and will not change.` },
  lift: { to: toContributor, subject: (s) => `${versionOf(s)} is public`, body: (s) => `The embargo on "${s.title}" has ended. It is public as ${versionOf(s)} and will not change.` },
  withdraw: { to: toContributor, subject: (s) => `${versionOf(s)} was withdrawn`, body: (s, reason) => `Two curators withdrew ${versionOf(s)}, "${s.title}", for this reason, which its page shows:${because(reason)}\n\nThe page, the result and the proof stay; the dataset is no longer handed out.` },
  cancel: { to: toClaimant, subject: (s) => `${s.id} was cancelled`, body: (s) => `The contributor cancelled "${s.title}", which you had taken for review.` },
};

/** Curators without an interest in the organisation at this instant. */
export const curatorsWithoutInterest = async ({ em, clock }: Work, organisation: string): Promise<string[]> => {
  const rows = await runSql<{ email: string }>(
    em,
    `select distinct u.email from app_user u join role_grant r on r.user_id = u.id and r.role = 'curator' and r.since <= $2 and (r.until is null or r.until > $2)
      where u.disabled_at is null and not exists (
        select 1 from membership m where m.user_id = u.id and m.organisation_id = $1 and m.since <= $2 and (m.until is null or m.until > $2::timestamptz - make_interval(months => $3)))
      order by u.email`,
    [organisation, clock.now(), interestMonths],
  );
  return rows.map((row) => row.email);
};

const emailOf = async ({ em }: Work, id: string | undefined): Promise<string[]> => {
  const user = id === undefined ? null : await em.findOne(User, { id, disabledAt: null });
  return user ? [user.email] : [];
};

export const writeMail = async ({ em, queue, clock }: Work, recipients: readonly string[], letter: { subject: string; body: string; topicId: string }): Promise<void> => {
  for (const recipient of recipients) await queueMail(em, queue, clock.now(), { recipient, ...letter, topic: 'submission' });
};

/** Writes the letter that a move owes into the outbox, in the move's transaction. */
export const oweMail = async (work: Work, submission: Submission, move: Move, reason: string | null): Promise<void> => {
  const letter = letters[move];
  if (!letter) return;
  const recipients =
    letter.to === toCurators ? await curatorsWithoutInterest(work, submission.organisation.id)
    : letter.to === toClaimant ? await emailOf(work, submission.claimedBy?.id)
    : await emailOf(work, submission.createdBy.id);
  await writeMail(work, recipients, { subject: letter.subject(submission), body: letter.body(submission, reason), topicId: submission.id });
};
