import type { EntityManager } from '@mikro-orm/postgresql';
import { AppError } from '#shared/errors/app-error.ts';
import { User } from '#api/entities/user.ts';
import { recordAudit } from '#api/lib/audit.ts';

/** What the sign-in service says of a person. */
export interface Identity {
  subject: string;
  email: string;
  emailVerified: boolean;
  name: string;
}

/**
 * The registry's person for a proven identity: known by subject, or invited by e-mail and now seen for the first
 * time, or new. Only an address that the sign-in service has verified counts.
 */
export const signIn = async (em: EntityManager, identity: Identity, now: Date): Promise<{ id: string }> =>
  em.transactional(async (tx) => {
    if (!identity.emailVerified) throw new AppError('not-allowed', `The address ${identity.email} is not verified by the sign-in service.`);
    const email = identity.email.trim().toLowerCase();
    const user =
      (await tx.findOne(User, { subject: identity.subject })) ??
      (await tx.findOne(User, { email, subject: null })) ??
      tx.create(User, { subject: identity.subject, email, name: identity.name, createdAt: now, lastSignInAt: null, disabledAt: null });
    if (user.disabledAt) throw new AppError('not-allowed', 'This account was closed by a steward.');
    user.subject = identity.subject;
    user.lastSignInAt = now;
    await tx.flush();
    recordAudit(tx, { at: now, action: 'session.begin', subjectType: 'user', subjectId: user.id });
    return { id: user.id };
  });
