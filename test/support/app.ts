import { createServer, type Server } from 'node:http';
import type { AddressInfo } from 'node:net';
import { inject } from 'vitest';
import { buildApp, type App } from '../../server/app';
import { readConfig, type Config } from '../../server/platform/config';
import { openMailer } from '../../server/platform/mail';
import { openPlatform } from '../../server/platform/open-platform';
import type { Platform } from '../../server/platform/platform';
import { startWorker } from '../../server/worker/worker';
import { createDatabase } from './database';
import { serviceEnvironment } from './environment';
import { Caller } from './caller';

export interface TestApp {
  readonly url: string;
  readonly platform: Platform;
  readonly routes: App['routes'];
  /** Somebody with a browser of their own: cookies, and the cross-site pair. */
  caller(): Caller;
  /** Starts a worker on this database; ended with the app. */
  work(): Promise<void>;
  stop(): Promise<void>;
}

/** The whole api on a database of its own, on a free port. @param change settings that differ from the tests' usual ones */
export async function startApp(
  change: Partial<Config> = {},
  environment: NodeJS.ProcessEnv = {},
): Promise<TestApp> {
  const services = inject('services');
  const database = await createDatabase(services);
  const config = {
    ...readConfig({ ...serviceEnvironment(services, database.url), LOG_LEVEL: 'silent', ...environment }),
    ...change,
  };
  const { platform, close } = openPlatform(config, 'test');
  const mailer = openMailer(config.smtpUrl, config.mailFrom);
  const { app, routes } = buildApp(platform, mailer);
  const server = await listen(createServer({ requestTimeout: 0 }, app));
  const url = `http://127.0.0.1:${String((server.address() as AddressInfo).port)}`;
  const stops: (() => Promise<void>)[] = [];
  return {
    url,
    platform,
    routes,
    caller: () => new Caller(url),
    async work() {
      const worker = await startWorker(platform, mailer);
      stops.push(() => worker.stop());
    },
    async stop() {
      for (const stop of stops) await stop();
      server.closeAllConnections();
      await new Promise((resolve) => server.close(resolve));
      mailer.close();
      await close();
      await database.drop();
    },
  };
}

function listen(server: Server): Promise<Server> {
  return new Promise((resolve, reject) => {
    server.once('error', reject);
    server.listen(0, '127.0.0.1', () => {
      resolve(server);
    });
  });
}
