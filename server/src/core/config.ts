import { z } from 'zod';

/** Everything a process may be told from outside. Read once, checked, and passed on. */
const environment = z.object({
  NODE_ENV: z.enum(['production', 'development', 'test']).default('production'),
  HOST: z.string().default('127.0.0.1'),
  PORT: z.coerce.number().int().min(0).max(65535).default(8080),
  WORKER_PORT: z.coerce.number().int().min(0).max(65535).default(0),
  /** The address people reach the web application at: it stands in mailed links. */
  PUBLIC_URL: z.url().default('http://127.0.0.1:8080'),
  DATABASE_APP_URL: z.string().min(1),
  DATABASE_PLATFORM_URL: z.string().min(1),
  /** For LISTEN, which a pool in transaction mode cannot carry; default: DATABASE_APP_URL. */
  DATABASE_DIRECT_URL: z.string().optional(),
  DATABASE_POOL: z.coerce.number().int().min(1).max(100).default(16),
  SMTP_URL: z.string().default('smtp://127.0.0.1:2525'),
  MAIL_FROM: z.string().default('Tumblewright <post@tumblewright.example>'),
  STRIPE_SECRET_KEY: z.string().default(''),
  STRIPE_API_BASE: z.string().optional(),
  STRIPE_WEBHOOK_SECRET: z.string().default(''),
  SESSION_SECRET: z.string().min(32),
  FILES_DIR: z.string().default('.data/files'),
  WEB_DIR: z.string().default('dist/web'),
  LOG_LEVEL: z.enum(['fatal', 'error', 'warn', 'info', 'debug', 'trace', 'silent']).default('info'),
  /** How many requests a minute one address may make; 0 turns the limit off (benches only). */
  RATE_LIMIT: z.coerce.number().int().min(0).default(1200),
  SIGN_IN_RATE_LIMIT: z.coerce.number().int().min(0).default(30),
  TRUST_PROXY: z.string().optional(),
});

export type Config = ReturnType<typeof readConfig>;

/** Throws an error that names each variable that is missing or wrong. */
export function readConfig(from: NodeJS.ProcessEnv = process.env) {
  const read = environment.safeParse(from);
  if (!read.success) {
    const wrong = read.error.issues.map((i) => `${i.path.join('.')}: ${i.message}`).join('; ');
    throw new Error(`The environment is not complete. ${wrong}`);
  }
  const e = read.data;
  return {
    mode: e.NODE_ENV,
    host: e.HOST,
    port: e.PORT,
    workerPort: e.WORKER_PORT,
    publicUrl: e.PUBLIC_URL.replace(/\/$/, ''),
    database: {
      appUrl: e.DATABASE_APP_URL,
      platformUrl: e.DATABASE_PLATFORM_URL,
      directUrl: e.DATABASE_DIRECT_URL ?? e.DATABASE_APP_URL,
      pool: e.DATABASE_POOL,
    },
    mail: { smtpUrl: e.SMTP_URL, from: e.MAIL_FROM },
    card: {
      secretKey: e.STRIPE_SECRET_KEY,
      apiBase: e.STRIPE_API_BASE,
      webhookSecret: e.STRIPE_WEBHOOK_SECRET,
    },
    sessionSecret: e.SESSION_SECRET,
    /** Of bcrypt: dear for whoever guesses; cheap in tests, which sign in hundreds of times. */
    passwordCost: e.NODE_ENV === 'test' ? 4 : 12,
    filesDir: e.FILES_DIR,
    webDir: e.WEB_DIR,
    logLevel: e.LOG_LEVEL,
    rateLimit: e.RATE_LIMIT,
    signInRateLimit: e.SIGN_IN_RATE_LIMIT,
    trustProxy: e.TRUST_PROXY,
  };
}

let current: Config | undefined;

/** Called once by the process when it opens its services. */
export function useConfig(read: Config): void {
  current = read;
}

/** What this process was told, for use cases that make links, mails and passwords. */
export function config(): Config {
  if (!current) throw new Error('The configuration is not read: call useConfig first.');
  return current;
}
