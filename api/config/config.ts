import { resolve } from 'node:path';
import { environmentSchema, launcherSchema, parseEnvironment, type Environment, type LauncherEnvironment } from './environment.ts';

export interface GoogleConfig {
  clientId: string;
  clientSecret: string;
  authorizationUrl: string;
  tokenUrl: string;
  userinfoUrl: string;
}

/** The agency that registers DOIs, by DataCite's REST interface. */
export interface DoiConfig {
  url: string;
  user: string;
  password: string;
  /** "10.1234" */
  prefix: string;
}

export interface Config {
  environment: Environment['NODE_ENV'];
  host: string;
  port: number;
  /** Where readers reach the registry, without a trailing slash. */
  publicUrl: string;
  /** Cookies are bound to the host and to https. */
  secureCookies: boolean;
  databaseUrl: string;
  /** The connection that may change the schema; the application's own where none is given. */
  ownerUrl: string;
  databasePool: number;
  sessionSecret: string;
  /** Ed25519 private key of the log: PKCS #8, base64. */
  logSigningKey: string;
  google: GoogleConfig;
  smtpUrl: string;
  mailFrom: string;
  /** Null: no DOIs are registered. */
  doi: DoiConfig | null;
  logLevel: Environment['LOG_LEVEL'];
  trustProxy: number;
  rateLimits: boolean;
  webRoot: string;
  schemaRoot: string;
  dataDir: string;
  workerThreads: number | undefined;
  threadFile: string | undefined;
  workerHealthPort: number | undefined;
}

const loopbackHosts = new Set(['127.0.0.1', 'localhost', '[::1]', '::1']);

/** Does an address stay on this machine? */
export const isLoopback = (url: string): boolean => loopbackHosts.has(new URL(url).hostname);

/** All four variables of the agency, or none. */
const doiFrom = ({ DATACITE_URL: url, DATACITE_USER: user, DATACITE_PASSWORD: password, DOI_PREFIX: prefix }: Environment, publicUrl: string): DoiConfig | null => {
  if (url === undefined && user === undefined && password === undefined && prefix === undefined) return null;
  if (url === undefined || user === undefined || password === undefined || prefix === undefined) throw new Error('The settings cannot be used:\n  DATACITE_URL, DATACITE_USER, DATACITE_PASSWORD and DOI_PREFIX are set together or not at all.');
  if (!isLoopback(publicUrl) && isLoopback(url)) throw new Error(`The settings cannot be used:\n  PUBLIC_URL = "${publicUrl}" is a public address, but DOIs go to the local stand-in at ${url}.`);
  return { url, user, password, prefix };
};

/** The whole configuration from a set of variables. Refuses a public registry whose sign-in is a stand-in. */
export const configFrom = (source: Record<string, string | undefined>): Config => {
  const env = parseEnvironment(environmentSchema, source);
  const publicUrl = env.PUBLIC_URL ?? `http://${env.HOST}:${env.PORT}`;
  if (!isLoopback(publicUrl) && isLoopback(env.GOOGLE_AUTHORIZATION_URL)) {
    throw new Error(`The settings cannot be used:\n  PUBLIC_URL = "${publicUrl}" is a public address, but sign-in goes to the local stand-in at ${env.GOOGLE_AUTHORIZATION_URL}.`);
  }
  return {
    environment: env.NODE_ENV,
    host: env.HOST,
    port: env.PORT,
    publicUrl,
    secureCookies: publicUrl.startsWith('https://'),
    databaseUrl: env.DATABASE_URL,
    ownerUrl: env.DATABASE_OWNER_URL ?? env.DATABASE_URL,
    databasePool: env.DATABASE_POOL,
    sessionSecret: env.SESSION_SECRET,
    logSigningKey: env.LOG_SIGNING_KEY,
    google: {
      clientId: env.GOOGLE_CLIENT_ID,
      clientSecret: env.GOOGLE_CLIENT_SECRET,
      authorizationUrl: env.GOOGLE_AUTHORIZATION_URL,
      tokenUrl: env.GOOGLE_TOKEN_URL,
      userinfoUrl: env.GOOGLE_USERINFO_URL,
    },
    smtpUrl: env.SMTP_URL,
    mailFrom: env.MAIL_FROM,
    doi: doiFrom(env, publicUrl),
    logLevel: env.LOG_LEVEL,
    trustProxy: env.TRUST_PROXY,
    rateLimits: env.RATE_LIMITS,
    webRoot: resolve(env.WEB_ROOT),
    schemaRoot: resolve(env.SCHEMA_ROOT),
    dataDir: resolve(env.DATA_DIR),
    workerThreads: env.WORKER_THREADS,
    threadFile: env.THREAD_FILE,
    workerHealthPort: env.WORKER_HEALTH_PORT,
  };
};

/** The running process's configuration. */
export const readConfig = (): Config => configFrom(process.env);

/** What was set in front of `npm start` or `npm test`. */
export const readLauncherEnvironment = (): LauncherEnvironment => parseEnvironment(launcherSchema, process.env);

/** This process's variables, to hand on to a child process with additions. */
export const inheritedEnvironment = (): Record<string, string | undefined> => ({ ...process.env });
