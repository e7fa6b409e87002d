import { spawn, type ChildProcess } from 'node:child_process';
import { testLogKey } from './log-key.ts';

/** A worker process as `npm start` starts it, on a test's own database; the test kills it. */
export const startWorkerProcess = (databaseUrl: string): ChildProcess =>
  spawn(process.execPath, ['--import', 'tsx', '--disable-warning=DeprecationWarning', 'api/worker.ts'], {
    stdio: 'ignore',
    env: {
      ...process.env, NODE_ENV: 'test', DATABASE_URL: databaseUrl, SESSION_SECRET: 'a secret for tests only, long enough', LOG_SIGNING_KEY: testLogKey, GOOGLE_CLIENT_ID: 'x', GOOGLE_CLIENT_SECRET: 'x',
      GOOGLE_AUTHORIZATION_URL: 'http://127.0.0.1:9/authorize', GOOGLE_TOKEN_URL: 'http://127.0.0.1:9/token', GOOGLE_USERINFO_URL: 'http://127.0.0.1:9/userinfo', SMTP_URL: 'smtp://127.0.0.1:9', LOG_LEVEL: 'silent', WORKER_THREADS: '1',
    },
  });
