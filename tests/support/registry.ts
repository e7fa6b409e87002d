import { createServer } from 'node:http';
import { mkdtempSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join, resolve } from 'node:path';
import { pino } from 'pino';
import { afterAll, beforeAll } from 'vitest';
import { createApp } from '#api/app.ts';
import { buildAll } from '#api/cli/build.ts';
import { freePort } from '#api/cli/free-port.ts';
import { startGoogleStandIn } from '#api/fakes/google/start.ts';
import { startMailStandIn } from '#api/fakes/mail/start.ts';
import { registerPeople } from '#api/fakes/register-people.ts';
import { allJobs } from '#api/jobs/all-jobs.ts';
import { startWorker } from '#api/jobs/start-worker.ts';
import { makeDeps, type OwnedDeps } from '#api/lib/make-deps.ts';
import { testConfig } from './test-app.ts';
import { createTestDatabase, dropTestDatabase } from './test-database.ts';

export interface Registry {
  base: string;
  deps: OwnedDeps;
  mailFolder: string;
}

/** The whole registry for one test file: built client, web, worker with threads, both stand-ins, a database of its own. */
export const useRegistry = (): (() => Registry) => {
  let made: Registry | undefined;
  const undo: (() => Promise<unknown>)[] = [];
  beforeAll(async () => {
    await buildAll(() => undefined);
    const database = await createTestDatabase();
    undo.push(() => dropTestDatabase(database));
    const port = await freePort();
    const base = `http://127.0.0.1:${port}`;
    const credentials = { clientId: 'evenbeam-local', clientSecret: 'local-only' };
    const standIn = await startGoogleStandIn({ ...credentials, publicUrl: base, redirectUri: `${base}/auth/google/callback` });
    undo.push(() => standIn.stop());
    const mailFolder = mkdtempSync(join(tmpdir(), 'evenbeam-mail-'));
    const mail = await startMailStandIn(mailFolder);
    undo.push(() => mail.stop());
    const config = testConfig(database.url, {
      PORT: String(port), PUBLIC_URL: base, SMTP_URL: mail.url, WEB_ROOT: 'dist/web', THREAD_FILE: resolve('dist/api/thread.js'), WORKER_THREADS: '2',
      GOOGLE_AUTHORIZATION_URL: standIn.authorizationUrl, GOOGLE_TOKEN_URL: standIn.tokenUrl, GOOGLE_USERINFO_URL: standIn.userinfoUrl,
    });
    const deps = await makeDeps(config, { log: pino({ level: 'warn' }, pino.destination(2)) });
    undo.push(() => deps.close());
    await registerPeople(deps.orm.em.fork(), new Date('2025-01-06T09:00:00Z'));
    const worker = await startWorker(deps, allJobs);
    undo.push(() => worker.stop());
    const server = createServer(createApp(deps));
    await new Promise<void>((done) => server.listen(port, '127.0.0.1', done));
    undo.push(() => new Promise((done) => {
      server.close(done);
      server.closeAllConnections();
    }));
    made = { base, deps, mailFolder };
  });
  afterAll(async () => {
    for (const step of undo.reverse()) await step();
  });
  return () => {
    if (!made) throw new Error('The registry is there only while tests run.');
    return made;
  };
};
