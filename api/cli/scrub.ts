import { join, resolve } from 'node:path';
import { MikroORM } from '@mikro-orm/postgresql';
import { readLauncherEnvironment } from '#api/config/config.ts';
import { readLogKey } from '#api/lib/log-key.ts';
import { ormOptions } from '#api/mikro-orm.config.ts';
import { scrub } from '#api/modules/scrub/scrub.ts';
import { reachDatabase } from './start/database.ts';
import { readSecrets } from './start/secrets.ts';

/**
 * npm run scrub: hashes the whole record of this registry again. The database is that of DATABASE_URL, or the one of this folder.
 * Exit 0: all as it was written. 1: something was changed, and what. 2: the record cannot be read.
 */
const run = async (): Promise<number> => {
  const settings = readLauncherEnvironment();
  const dataDir = resolve('.data');
  const secrets = readSecrets(join(dataDir, 'secrets.json'));
  const database = await reachDatabase(settings, dataDir, secrets, (line) => console.error(line));
  const orm = await MikroORM.init(ormOptions(database.url, 2));
  try {
    const trustedKeys = [readLogKey(settings.LOG_SIGNING_KEY ?? secrets.log).keyId, ...(settings.LOG_OLDER_KEYS ?? [])];
    const { looked, findings } = await scrub({ em: orm.em.fork(), trustedKeys }, (name, { looked: n, findings: f }) => console.log(`${f.length === 0 ? 'as written' : `${f.length} CHANGED`}  ${name}: ${n} looked at`));
    for (const { where, sentence } of findings) console.log(`${where}: ${sentence}`);
    console.log(findings.length === 0 ? `The record is as it was written (${looked} things looked at).` : `${findings.length} of ${looked} things looked at are not as they were written.`);
    return findings.length === 0 ? 0 : 1;
  } finally {
    await orm.close(true);
    await database.stop();
  }
};

try {
  process.exitCode = await run();
} catch (fault) {
  console.error(fault instanceof Error ? fault.message : fault);
  process.exitCode = 2;
}
