import { z } from 'zod';

/** A whole web address without a trailing slash. */
const address = z.url().transform((s) => s.replace(/\/+$/, ''));
const port = z.coerce.number().int().min(0).max(65535);
const flag = z.enum(['0', '1', 'true', 'false']).transform((s) => s === '1' || s === 'true');

/** Every environment variable the registry's processes know. Empty strings count as absent. */
export const environmentSchema = z.object({
  NODE_ENV: z.enum(['development', 'test', 'production']).default('production'),
  HOST: z.string().default('127.0.0.1'),
  PORT: port.default(8080),
  PUBLIC_URL: address.optional(),
  DATABASE_URL: z.string().startsWith('postgres'),
  DATABASE_OWNER_URL: z.string().startsWith('postgres').optional(),
  DATABASE_POOL: z.coerce.number().int().min(2).max(100).default(10),
  SESSION_SECRET: z.string().min(32, 'must have at least 32 characters'),
  LOG_SIGNING_KEY: z.string().min(1),
  GOOGLE_CLIENT_ID: z.string().min(1),
  GOOGLE_CLIENT_SECRET: z.string().min(1),
  GOOGLE_AUTHORIZATION_URL: address.default('https://accounts.google.com/o/oauth2/v2/auth'),
  GOOGLE_TOKEN_URL: address.default('https://oauth2.googleapis.com/token'),
  GOOGLE_USERINFO_URL: address.default('https://openidconnect.googleapis.com/v1/userinfo'),
  SMTP_URL: z.string().regex(/^smtps?:\/\//, 'must begin with smtp:// or smtps://'),
  MAIL_FROM: z.string().default('Evenbeam registry <registry@evenbeam.example>'),
  DATACITE_URL: address.optional(),
  DATACITE_USER: z.string().optional(),
  DATACITE_PASSWORD: z.string().optional(),
  DOI_PREFIX: z.string().regex(/^10\.\d{4,9}$/, 'must be a DOI prefix such as 10.1234').optional(),
  LOG_LEVEL: z.enum(['fatal', 'error', 'warn', 'info', 'debug', 'trace', 'silent']).default('info'),
  TRUST_PROXY: z.coerce.number().int().min(0).max(5).default(0),
  RATE_LIMITS: flag.default(true),
  WEB_ROOT: z.string().default('dist/web'),
  SCHEMA_ROOT: z.string().default('schema'),
  DATA_DIR: z.string().default('.data'),
  WORKER_THREADS: z.coerce.number().int().min(1).max(64).optional(),
  THREAD_FILE: z.string().optional(),
  WORKER_HEALTH_PORT: port.optional(),
});

export type Environment = z.infer<typeof environmentSchema>;

/** The launcher's own wishes: what a person may set in front of `npm start`. */
export const launcherSchema = environmentSchema
  .pick({ HOST: true, PORT: true, PUBLIC_URL: true, DATABASE_OWNER_URL: true, LOG_LEVEL: true })
  .extend({
    DATABASE_URL: environmentSchema.shape.DATABASE_URL.optional(),
    SESSION_SECRET: environmentSchema.shape.SESSION_SECRET.optional(),
    LOG_SIGNING_KEY: environmentSchema.shape.LOG_SIGNING_KEY.optional(),
    LOG_OLDER_KEYS: z.string().transform((text) => text.split(',').map((key) => key.trim()).filter(Boolean)).optional(),
    GOOGLE_CLIENT_ID: z.string().optional(),
    GOOGLE_CLIENT_SECRET: z.string().optional(),
    SMTP_URL: environmentSchema.shape.SMTP_URL.optional(),
    DATACITE_URL: environmentSchema.shape.DATACITE_URL,
    DEMO: flag.optional(),
    CI: z.string().optional(),
  });

export type LauncherEnvironment = z.infer<typeof launcherSchema>;

const withoutBlanks = (source: Record<string, string | undefined>): Record<string, string> =>
  Object.fromEntries(Object.entries(source).filter((pair): pair is [string, string] => pair[1] !== undefined && pair[1] !== ''));

/** Parses variables with a schema; the error names each variable, the reason and (unless secret) its value. */
export const parseEnvironment = <T extends z.ZodType>(schema: T, source: Record<string, string | undefined>): z.infer<T> => {
  const parsed = schema.safeParse(withoutBlanks(source));
  if (parsed.success) return parsed.data;
  const lines = parsed.error.issues.map((issue) => {
    const name = issue.path.join('.');
    const given = source[name];
    const secret = /SECRET|DATABASE|SMTP|KEY|PASSWORD/.test(name);
    return given === undefined || given === '' ? `${name} is not set.` : `${name}${secret ? '' : ` = ${JSON.stringify(given)}`}: ${issue.message}.`;
  });
  throw new Error(`The settings cannot be used:\n  ${lines.join('\n  ')}`);
};
