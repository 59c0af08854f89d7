import * as z from 'zod';

const flag = z.enum(['0', '1', 'true', 'false']).transform((value) => value === '1' || value === 'true');
/** An empty setting means the same as a missing one. */
const optional = <T extends z.ZodType>(schema: T) =>
  z.preprocess((value) => (value === '' ? undefined : value), schema.optional());

const Environment = z.object({
  NODE_ENV: z.string().default('development'),
  HOST: z.string().default('127.0.0.1'),
  PORT: z.coerce.number().int().min(0).max(65535).default(4300),
  PUBLIC_URL: optional(z.url()),
  DATABASE_URL: z.url(),
  S3_ENDPOINT: z.url(),
  S3_REGION: z.string().default('us-east-1'),
  S3_BUCKET: z.string().default('midfoot'),
  S3_ACCESS_KEY: z.string(),
  S3_SECRET_KEY: z.string(),
  SMTP_URL: z.url(),
  MAIL_FROM: z.string().default('Midfoot <post@midfoot.example>'),
  MAILBOX_URL: optional(z.url()),
  SESSION_SECRET: z.string().min(32, 'SESSION_SECRET needs at least 32 characters'),
  STORAGE_DIR: z.string().default('storage'),
  DEMO: flag.default(false),
  CLIENT_DIR: z.string().default('dist/client/browser'),
  LOG_LEVEL: z.enum(['fatal', 'error', 'warn', 'info', 'debug', 'trace', 'silent']).default('info'),
  WORKER_CONCURRENCY: z.coerce.number().int().min(1).max(16).default(1),
  WORK_DIR: optional(z.string()),
  ARGON2_MEMORY_KIB: z.coerce.number().int().min(256).default(47104),
  ARGON2_PASSES: z.coerce.number().int().min(1).default(1),
  UPLOAD_MAX_BYTES: z.coerce.number().int().min(1024).default(524_288_000),
  CLIP_MAX_MS: z.coerce.number().int().min(1000).default(120_000),
  PROXY_SHORT_SIDE: z.coerce.number().int().min(240).max(2160).default(720),
  SECURE_COOKIES: optional(flag),
  METRICS_TOKEN: optional(z.string()),
  TRUST_PROXY: optional(z.string()),
});

export interface Config {
  readonly production: boolean;
  readonly host: string;
  readonly port: number;
  /** Where people reach the application; the base of every link in a mail. */
  readonly publicUrl: string;
  readonly databaseUrl: string;
  readonly store: {
    readonly endpoint: string;
    readonly region: string;
    readonly bucket: string;
    readonly accessKey: string;
    readonly secretKey: string;
  };
  readonly smtpUrl: string;
  readonly mailFrom: string;
  /** Where the mail fake lists what it received; null with a real mail service. */
  readonly mailboxUrl: string | null;
  readonly sessionSecret: string;
  readonly storageDir: string;
  readonly demo: boolean;
  readonly clientDir: string;
  readonly logLevel: string;
  readonly workerConcurrency: number;
  readonly workDir: string | null;
  readonly argon2: { readonly memoryKiB: number; readonly passes: number };
  readonly uploadMaxBytes: number;
  readonly clipMaxMs: number;
  readonly proxyShortSide: number;
  readonly secureCookies: boolean;
  readonly metricsToken: string | null;
  readonly trustProxy: string | null;
}

/**
 * Reads the settings from the environment; nothing else in the program looks at it.
 * @throws Error naming each missing or malformed setting.
 */
export function readConfig(env: NodeJS.ProcessEnv): Config {
  const parsed = Environment.safeParse(env);
  if (!parsed.success) {
    const lines = parsed.error.issues.map((issue) => `  ${issue.path.join('.')}: ${issue.message}`);
    throw new Error(`These settings are missing or malformed (see .env.example):\n${lines.join('\n')}`);
  }
  const e = parsed.data;
  const publicUrl = (e.PUBLIC_URL ?? `http://${e.HOST}:${e.PORT}`).replace(/\/$/, '');
  return {
    production: e.NODE_ENV === 'production',
    host: e.HOST,
    port: e.PORT,
    publicUrl,
    databaseUrl: e.DATABASE_URL,
    store: {
      endpoint: e.S3_ENDPOINT,
      region: e.S3_REGION,
      bucket: e.S3_BUCKET,
      accessKey: e.S3_ACCESS_KEY,
      secretKey: e.S3_SECRET_KEY,
    },
    smtpUrl: e.SMTP_URL,
    mailFrom: e.MAIL_FROM,
    mailboxUrl: e.MAILBOX_URL ?? null,
    sessionSecret: e.SESSION_SECRET,
    storageDir: e.STORAGE_DIR,
    demo: e.DEMO,
    clientDir: e.CLIENT_DIR,
    logLevel: e.LOG_LEVEL,
    workerConcurrency: e.WORKER_CONCURRENCY,
    workDir: e.WORK_DIR ?? null,
    argon2: { memoryKiB: e.ARGON2_MEMORY_KIB, passes: e.ARGON2_PASSES },
    uploadMaxBytes: e.UPLOAD_MAX_BYTES,
    clipMaxMs: e.CLIP_MAX_MS,
    proxyShortSide: e.PROXY_SHORT_SIDE,
    secureCookies: e.SECURE_COOKIES ?? publicUrl.startsWith('https:'),
    metricsToken: e.METRICS_TOKEN ?? null,
    trustProxy: e.TRUST_PROXY ?? null,
  };
}
