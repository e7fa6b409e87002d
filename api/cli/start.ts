import { mkdirSync } from 'node:fs';
import { join, resolve } from 'node:path';
import { MikroORM } from '@mikro-orm/postgresql';
import { configFrom, inheritedEnvironment, isLoopback, readLauncherEnvironment } from '#api/config/config.ts';
import { startDoiStandIn } from '#api/fakes/doi/start.ts';
import { startGoogleStandIn } from '#api/fakes/google/start.ts';
import { startMailStandIn } from '#api/fakes/mail/start.ts';
import { registerPeople } from '#api/fakes/register-people.ts';
import { migrate } from '#api/lib/migrate.ts';
import { ormOptions } from '#api/mikro-orm.config.ts';
import { buildAll } from './build.ts';
import { portIsTaken } from './free-port.ts';
import { startDatabase } from './start/database.ts';
import { keepRunning, type KeptChild } from './start/keep-running.ts';
import { takeLock } from './start/lock.ts';
import { readSecrets } from './start/secrets.ts';
import { seedIfEmpty } from './start/seed.ts';
import { waitForHealth } from './start/wait-for-health.ts';
import { whoCanSignIn } from './start/who-can-sign-in.ts';

/** Since when the invented people hold their parts: before the oldest entry of the demo registry. */
const inventedSince = new Date('2024-01-08T09:00:00Z');
const dataDir = resolve('.data');
const say = (line: string): void => console.log(line);

/** What was started, to be stopped in the reverse order. */
const started: (() => Promise<void> | void)[] = [];
let stopping: Promise<void> | null = null;
const stopAll = (): Promise<void> =>
  (stopping ??= (async () => {
    for (const stop of started.reverse()) await Promise.resolve(stop()).catch((fault: unknown) => console.error(fault instanceof Error ? fault.message : fault));
  })());

const end = async (code: number): Promise<never> => {
  await stopAll();
  process.exit(code);
};

/** Thrown between two steps of the set-up once somebody has asked to stop. */
class Told extends Error {}
let wasTold = false;
const told = new Promise<'told'>((resolveTold) => {
  const tell = (): void => {
    wasTold = true;
    resolveTold('told');
  };
  for (const signal of ['SIGINT', 'SIGTERM', 'SIGHUP'] as const) process.on(signal, tell);
  process.on('disconnect', tell);
});

/** Takes a step of the set-up whole: a stop waits for its end, and no further step begins. */
const step = async <T>(work: () => Promise<T>): Promise<T> => {
  const check = (): void => {
    if (wasTold) throw new Told('stopped during the set-up');
  };
  check();
  const value = await work();
  check();
  return value;
};

/** Sets everything up and gives the processes to watch. */
const start = async (): Promise<KeptChild[]> => {
  const settings = readLauncherEnvironment();
  mkdirSync(dataDir, { recursive: true });
  started.push(takeLock(join(dataDir, 'start.pid')));
  if (await portIsTaken(settings.PORT, settings.HOST)) throw new Error(`Port ${settings.PORT} on ${settings.HOST} is taken by another program. Choose another one: PORT=${settings.PORT + 1} npm start`);
  const secrets = readSecrets(join(dataDir, 'secrets.json'));
  const publicUrl = settings.PUBLIC_URL ?? `http://${settings.HOST}:${settings.PORT}`;

  const database = await startDatabase(settings, dataDir, secrets, say);
  started.push(() => database.stop());
  const ran = await step(() => migrate(database.ownerUrl, database.url));
  if (ran.length > 0) say(`Database schema: ${ran.join(', ')}.`);

  const real = settings.GOOGLE_CLIENT_ID !== undefined;
  const credentials = real ? { clientId: settings.GOOGLE_CLIENT_ID ?? '', clientSecret: settings.GOOGLE_CLIENT_SECRET ?? '' } : { clientId: 'evenbeam-local', clientSecret: secrets.google };
  const standIn = real ? null : await startGoogleStandIn({ ...credentials, publicUrl, redirectUri: `${publicUrl}/auth/google/callback` });
  if (standIn) started.push(() => standIn.stop());
  const mail = settings.SMTP_URL ? null : await startMailStandIn(join(dataDir, 'mail'));
  if (mail) started.push(() => mail.stop());
  const agency = settings.DATACITE_URL || !isLoopback(publicUrl) ? null : await startDoiStandIn(join(dataDir, 'dois'), secrets.google);
  if (agency) started.push(() => agency.stop());

  const own = {
    NODE_ENV: 'production',
    HOST: settings.HOST,
    PORT: String(settings.PORT),
    PUBLIC_URL: publicUrl,
    DATABASE_URL: database.url,
    DATABASE_OWNER_URL: undefined,
    SESSION_SECRET: settings.SESSION_SECRET ?? secrets.session,
    LOG_SIGNING_KEY: settings.LOG_SIGNING_KEY ?? secrets.log,
    GOOGLE_CLIENT_ID: credentials.clientId,
    GOOGLE_CLIENT_SECRET: credentials.clientSecret,
    ...(standIn ? { GOOGLE_AUTHORIZATION_URL: standIn.authorizationUrl, GOOGLE_TOKEN_URL: standIn.tokenUrl, GOOGLE_USERINFO_URL: standIn.userinfoUrl } : {}),
    SMTP_URL: settings.SMTP_URL ?? mail?.url,
    ...(agency ? { DATACITE_URL: agency.url, DATACITE_USER: agency.user, DATACITE_PASSWORD: agency.password, DOI_PREFIX: agency.prefix } : {}),
    DATA_DIR: dataDir,
  };
  const env = { ...inheritedEnvironment(), ...own };

  if (standIn) {
    const orm = await MikroORM.init(ormOptions(database.url, 2));
    await step(() => registerPeople(orm.em.fork(), inventedSince)).finally(() => orm.close(true));
  }
  await step(() => buildAll(say));

  const built = { ...env, THREAD_FILE: resolve('dist/api/thread.js') };
  if (settings.DEMO ?? database.own) {
    // Filling is all or nothing, so a stop need not wait for its end.
    const filling = seedIfEmpty(configFrom({ ...built, LOG_LEVEL: 'warn' }), say);
    filling.catch(() => undefined);
    await step(() => Promise.race([filling, told]));
  }
  const children = (['server', 'worker'] as const).map((name) => keepRunning(name === 'server' ? 'web' : name, resolve(`dist/api/${name}.js`), built, join(dataDir, 'logs', `${name}.log`), say));
  for (const child of children) started.push(() => child.stop());
  await step(() => Promise.all(children.map((child) => child.ready)));
  await step(() => waitForHealth(`http://${settings.HOST}:${settings.PORT}`));

  say(`\nEvenbeam is at ${publicUrl}`);
  if (standIn) say(`Sign-in is a stand-in on this machine; these invented people can sign in:\n${whoCanSignIn()}`);
  if (mail) say(`Mail is kept in ${join(dataDir, 'mail')}; nothing is sent.`);
  if (agency) say(`DOIs are a stand-in on this machine and resolve nowhere; what is registered is kept in ${agency.file}.`);
  say('Stop with Ctrl-C.');
  return children;
};

// What a stop cuts off may still complain; a fault before that is real.
process.on('uncaughtException', (fault) => {
  if (wasTold) return;
  console.error(fault);
  void end(1);
});
const setUp = start();
setUp.catch(() => undefined);
try {
  const children = await Promise.race([setUp, told]);
  if (children !== 'told') {
    const outcome = await Promise.race([told, ...children.map((child) => child.failed)]);
    if (outcome !== 'told') {
      console.error(`\n${outcome}`);
      await end(1);
    }
  }
  say('\nStopping …');
  await Promise.race([setUp.catch(() => undefined), new Promise((resolveLate) => setTimeout(resolveLate, 30_000))]);
  await end(0);
} catch (fault) {
  console.error(`\n${fault instanceof Error ? fault.message : String(fault)}`);
  await end(1);
}
