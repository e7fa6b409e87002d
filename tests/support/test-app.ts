import type { Application } from 'express';
import pg from 'pg';
import { pino, type Logger } from 'pino';
import { afterAll, beforeAll } from 'vitest';
import { createApp } from '#api/app.ts';
import { configFrom, type Config } from '#api/config/config.ts';
import { startQueue } from '#api/jobs/queue.ts';
import { SettableClock } from '#api/lib/clock.ts';
import { readLogKey } from '#api/lib/log-key.ts';
import { startThreads } from '#api/jobs/threads.ts';
import type { Deps } from '#api/lib/deps.ts';
import type { Route } from '#api/lib/define-route.ts';
import { testLogKey } from './log-key.ts';
import { createTestDatabase, dropTestDatabase, type TestDatabase } from './test-database.ts';

export interface TestApp {
  app: Application;
  deps: Deps;
  clock: SettableClock;
  database: TestDatabase;
}

export const testConfig = (databaseUrl: string, more: Record<string, string> = {}): Config =>
  configFrom({
    NODE_ENV: 'test',
    DATABASE_URL: databaseUrl,
    SESSION_SECRET: 'a secret for tests only, long enough',
    LOG_SIGNING_KEY: testLogKey,
    GOOGLE_CLIENT_ID: 'evenbeam-local',
    GOOGLE_CLIENT_SECRET: 'local-only',
    GOOGLE_AUTHORIZATION_URL: 'http://127.0.0.1:9/authorize',
    GOOGLE_TOKEN_URL: 'http://127.0.0.1:9/token',
    GOOGLE_USERINFO_URL: 'http://127.0.0.1:9/userinfo',
    SMTP_URL: 'smtp://127.0.0.1:9',
    LOG_LEVEL: 'silent',
    RATE_LIMITS: '0',
    DATABASE_POOL: '5',
    ...more,
  });

/** The instant at which the clock of a test stands until the test moves it. */
export const testStart = new Date('2026-05-04T08:00:00Z');

export interface TestAppOptions {
  settings?: Record<string, string>;
  /** Instead of the real list. */
  routes?: readonly Route[];
  /** Set where a test brings faults about on purpose; otherwise a logged error fails the test with what was logged. */
  faultsExpected?: boolean;
}

const testLog = (quiet: boolean): Logger =>
  quiet ? pino({ level: 'silent' }) : pino({ level: 'error', base: null, timestamp: false }, { write: (line: string) => console.error(line) });

/** Registers an application with its own database for the test file it is called in. */
export const useTestApp = (options: TestAppOptions = {}): (() => TestApp) => {
  let made: TestApp | undefined;
  let pool: pg.Pool | undefined;
  beforeAll(async () => {
    const database = await createTestDatabase();
    const config = testConfig(database.url, options.settings);
    pool = new pg.Pool({ connectionString: database.url, max: 2 });
    const clock = new SettableClock(testStart);
    const queue = await startQueue(database.url, () => undefined);
    const deps: Deps = { config, orm: database.orm, pool, queue, threads: startThreads({ threads: 1 }), clock, logKey: readLogKey(testLogKey), log: testLog(options.faultsExpected ?? false) };
    made = { app: createApp(deps, options.routes), deps, clock, database };
  });
  afterAll(async () => {
    await made?.deps.queue.stop();
    await made?.deps.threads.stop();
    await pool?.end();
    if (made) await dropTestDatabase(made.database);
  });
  return () => {
    if (!made) throw new Error('The test application is there only while tests run.');
    return made;
  };
};
