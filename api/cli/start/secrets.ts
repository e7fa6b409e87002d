import { existsSync, readFileSync, writeFileSync } from 'node:fs';
import { z } from 'zod';
import { newLogKey } from '#api/lib/log-key.ts';
import { newSecret } from '#api/lib/secrets.ts';

const secretsSchema = z.object({ admin: z.string(), owner: z.string(), application: z.string(), session: z.string(), google: z.string(), log: z.string() });
/** As written before there was a log. */
const olderSchema = secretsSchema.omit({ log: true });
export type Secrets = z.infer<typeof secretsSchema>;

const write = (file: string, secrets: Secrets): Secrets => {
  writeFileSync(file, `${JSON.stringify(secrets, null, 2)}\n`, { mode: 0o600 });
  return secrets;
};

/** Passwords of this folder's own database, the key of its sessions and the key of its log: drawn once, kept for the owner's eyes only. */
export const readSecrets = (file: string): Secrets => {
  if (!existsSync(file)) return write(file, { admin: newSecret(), owner: newSecret(), application: newSecret(), session: newSecret(), google: newSecret(), log: newLogKey() });
  const kept: unknown = JSON.parse(readFileSync(file, 'utf8'));
  const whole = secretsSchema.safeParse(kept);
  if (whole.success) return whole.data;
  const older = olderSchema.safeParse(kept);
  if (older.success) return write(file, { ...older.data, log: newLogKey() });
  throw new Error(`${file} is not as this program wrote it. Put it back, or remove it together with the database beside it.`);
};
