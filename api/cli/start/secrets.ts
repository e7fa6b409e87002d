import { existsSync, readFileSync, writeFileSync } from 'node:fs';
import { z } from 'zod';
import { newSecret } from '#api/lib/secrets.ts';

const names = ['admin', 'owner', 'application', 'session', 'google'] as const;
const secretsSchema = z.object({ admin: z.string(), owner: z.string(), application: z.string(), session: z.string(), google: z.string() });
export type Secrets = z.infer<typeof secretsSchema>;

/** Passwords of this folder's own database and the key of its sessions: drawn once, kept for the owner's eyes only. */
export const readSecrets = (file: string): Secrets => {
  if (existsSync(file)) {
    const parsed = secretsSchema.safeParse(JSON.parse(readFileSync(file, 'utf8')));
    if (!parsed.success) throw new Error(`${file} is not as this program wrote it. Put it back, or remove it together with the database beside it.`);
    return parsed.data;
  }
  const made = Object.fromEntries(names.map((name) => [name, newSecret()]));
  writeFileSync(file, `${JSON.stringify(made, null, 2)}\n`, { mode: 0o600 });
  return secretsSchema.parse(made);
};
