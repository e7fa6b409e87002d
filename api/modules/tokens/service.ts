import { AppError } from '#shared/errors/app-error.ts';
import { ApiToken } from '#api/entities/api-token.ts';
import { Organisation } from '#api/entities/organisation.ts';
import { requireActor } from '#api/lib/actor.ts';
import { recordAudit } from '#api/lib/audit.ts';
import { newSecret, secretSha256 } from '#api/lib/secrets.ts';
import { inTransaction, type Work } from '#api/lib/work.ts';

/** Marks a secret as this registry's, so that a leaked one can be recognised. */
const tokenPrefix = 'evb_';
const hintLength = 10;

const audit = (work: Work, action: string, token: ApiToken): void => {
  recordAudit(work.em, { at: work.clock.now(), action, subjectType: 'token', subjectId: token.id, ...(work.caller ? { caller: work.caller } : {}), organisationId: token.organisation.id, requestId: work.requestId ?? null, detail: { name: token.name } });
};

/** Makes a token; the secret is returned once and only its hash is kept. */
export const createToken = (work: Work, input: { organisation: string; name: string }): Promise<{ token: ApiToken; secret: string }> =>
  inTransaction(work, async (tx) => {
    const actor = await requireActor(tx);
    const secret = newSecret(tokenPrefix);
    const token = tx.em.create(ApiToken, {
      organisation: tx.em.getReference(Organisation, input.organisation), createdBy: actor.userId, name: input.name, prefix: secret.slice(0, hintLength), sha256: secretSha256(secret),
      createdAt: tx.clock.now(), expiresAt: null, lastUsedAt: null, revokedAt: null,
    });
    await tx.em.flush();
    audit(tx, 'token.create', token);
    await tx.em.populate(token, ['createdBy', 'organisation']);
    return { token, secret };
  });

export const findToken = async ({ em }: Pick<Work, 'em'>, id: string): Promise<ApiToken> => {
  const token = await em.findOne(ApiToken, { id, revokedAt: null });
  if (!token) throw new AppError('not-found', 'There is no such token, or it is revoked.');
  return token;
};

/** From this moment on the token opens nothing. */
export const revokeToken = (work: Work, id: string): Promise<void> =>
  inTransaction(work, async (tx) => {
    const token = await findToken(tx, id);
    token.revokedAt = tx.clock.now();
    audit(tx, 'token.revoke', token);
  });
