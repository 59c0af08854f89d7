import { join } from 'node:path';
import { type ServiceAddresses } from './services';

/**
 * The whole environment of an api or a worker that works on the test services and the database at `databaseUrl`
 * (see .env.example for what each means). Passwords are hashed as cheaply as the settings allow.
 */
export function serviceEnvironment(services: ServiceAddresses, databaseUrl: string): NodeJS.ProcessEnv {
  return {
    PATH: process.env['PATH'],
    NODE_ENV: 'test',
    HOST: '127.0.0.1',
    PORT: '0',
    PUBLIC_URL: 'http://127.0.0.1:4300',
    DATABASE_URL: databaseUrl,
    S3_ENDPOINT: services.store.endpoint,
    S3_REGION: services.store.region,
    S3_BUCKET: services.store.bucket,
    S3_ACCESS_KEY: services.store.accessKeyId,
    S3_SECRET_KEY: services.store.secretAccessKey,
    SMTP_URL: services.mail.smtpUrl,
    MAIL_FROM: 'Midfoot <post@midfoot.example>',
    MAILBOX_URL: services.mail.mailboxUrl,
    SESSION_SECRET: 'a secret for tests alone, long enough',
    STORAGE_DIR: services.dir,
    WORK_DIR: join(services.dir, 'work'),
    DEMO: '0',
    LOG_LEVEL: 'warn',
    ARGON2_MEMORY_KIB: '256',
    ARGON2_PASSES: '1',
    AWS_SDK_JS_NODE_VERSION_SUPPORT_WARNING_DISABLED: 'true',
  };
}
