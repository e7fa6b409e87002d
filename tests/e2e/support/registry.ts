import { spawn, type ChildProcess } from 'node:child_process';
import { createWriteStream, mkdtempSync, readFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join, resolve } from 'node:path';
import type { MikroORM } from '@mikro-orm/postgresql';
import { afterAll, beforeAll } from 'vitest';
import { buildAll } from '#api/cli/build.ts';
import { freePort } from '#api/cli/free-port.ts';
import { waitForHealth } from '#api/cli/start/wait-for-health.ts';
import { configFrom, inheritedEnvironment } from '#api/config/config.ts';
import { seedDemo } from '#api/demo/seed.ts';
import { startGoogleStandIn } from '#api/fakes/google/start.ts';
import { startMailStandIn } from '#api/fakes/mail/start.ts';
import { registerPeople } from '#api/fakes/register-people.ts';
import { newLogKey } from '#api/lib/log-key.ts';
import { demoExcerpt } from '#tests/support/demo-excerpt.ts';
import { createTestDatabase, dropTestDatabase } from '#tests/support/test-database.ts';

export interface RunningRegistry {
  url: string;
  /** Origin of the stand-in for sign-in. */
  signIn: string;
  stop(): Promise<void>;
}

const fill = async (orm: MikroORM, env: Record<string, string>): Promise<void> => {
  await registerPeople(orm.em.fork(), new Date('2024-01-08T09:00:00Z'));
  await seedDemo({ config: configFrom({ ...env, LOG_LEVEL: 'warn' }), progress: () => undefined, told: demoExcerpt });
};

/** One process of the registry as `npm start` runs it; what it says goes to a file. */
const startProcess = (name: string, env: Record<string, string>, folder: string): ChildProcess => {
  const child = spawn(process.execPath, ['--disable-warning=DeprecationWarning', `dist/api/${name}.js`], { env: { ...inheritedEnvironment(), ...env }, stdio: ['ignore', 'pipe', 'pipe'] });
  const log = createWriteStream(join(folder, `${name}.log`));
  child.stdout.pipe(log);
  child.stderr.pipe(log, { end: false });
  return child;
};

const stopProcess = (child: ChildProcess): Promise<void> =>
  new Promise((done) => {
    if (child.exitCode !== null || child.signalCode !== null) return done();
    child.once('exit', () => done());
    child.kill('SIGTERM');
  });

/** The built registry, web process and worker, with stand-ins and a database of its own that holds an excerpt of the demo. */
const startRegistry = async (): Promise<RunningRegistry> => {
  const folder = mkdtempSync(join(tmpdir(), 'evenbeam-e2e-'));
  await buildAll(() => undefined);
  const port = await freePort();
  const url = `http://127.0.0.1:${port}`;
  const credentials = { clientId: 'evenbeam-local', clientSecret: 'local-only' };
  const google = await startGoogleStandIn({ ...credentials, publicUrl: url, redirectUri: `${url}/auth/google/callback` });
  const mail = await startMailStandIn(join(folder, 'mail'));
  const database = await createTestDatabase();
  const env = {
    NODE_ENV: 'production', HOST: '127.0.0.1', PORT: String(port), PUBLIC_URL: url, DATABASE_URL: database.url, SESSION_SECRET: 'a secret for these tests only, long enough', LOG_SIGNING_KEY: newLogKey(),
    GOOGLE_CLIENT_ID: credentials.clientId, GOOGLE_CLIENT_SECRET: credentials.clientSecret, GOOGLE_AUTHORIZATION_URL: google.authorizationUrl, GOOGLE_TOKEN_URL: google.tokenUrl,
    GOOGLE_USERINFO_URL: google.userinfoUrl, SMTP_URL: mail.url, DATA_DIR: folder, THREAD_FILE: resolve('dist/api/thread.js'), RATE_LIMITS: '0', WORKER_THREADS: '1',
  };
  await fill(database.orm, env);
  const children = ['server', 'worker'].map((name) => startProcess(name, env, folder));
  const stop = async (): Promise<void> => {
    await Promise.all(children.map(stopProcess));
    await google.stop();
    await mail.stop();
    await dropTestDatabase(database);
  };
  try {
    await waitForHealth(url);
  } catch (fault) {
    await stop();
    throw new Error(`${fault instanceof Error ? fault.message : String(fault)}\n${readFileSync(join(folder, 'server.log'), 'utf8').slice(-2000)}`, { cause: fault });
  }
  return { url, signIn: new URL(google.authorizationUrl).origin, stop };
};

/** A registry for the test file this is called in; its tests only add to it, and what they add has names of its own. */
export const useRunningRegistry = (): (() => RunningRegistry) => {
  let registry: RunningRegistry | undefined;
  beforeAll(async () => {
    registry = await startRegistry();
  }, 600_000);
  afterAll(() => registry?.stop());
  return () => {
    if (!registry) throw new Error('The registry is there only while tests run.');
    return registry;
  };
};
