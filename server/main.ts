import { createServer } from 'node:http';
import { buildApp } from './app';
import { readConfig } from './platform/config';
import { openMailer } from './platform/mail';
import { openPlatform } from './platform/open-platform';

const config = readConfig(process.env);
const { platform, close } = openPlatform(config, 'api');
const mailer = openMailer(config.smtpUrl, config.mailFrom);
const { app } = buildApp(platform, mailer);
// Node ends any request body after 300 s; a long upload on a slow network is watched by its own no-progress timer.
const server = createServer({ requestTimeout: 0 }, app);

server.listen(config.port, config.host, () => {
  platform.logger.info({ host: config.host, port: config.port }, 'listening');
});
server.on('error', (error) => {
  platform.logger.fatal({ err: error }, 'the api could not listen');
  process.exitCode = 1;
  void stop();
});

let stopping = false;
async function stop(): Promise<void> {
  if (stopping) return;
  stopping = true;
  const closed = new Promise((resolve) => server.close(resolve));
  server.closeIdleConnections();
  // Streams and long uploads are not waited for longer than this.
  const patience = setTimeout(() => {
    server.closeAllConnections();
  }, 3000);
  await closed;
  clearTimeout(patience);
  mailer.close();
  await close();
}
for (const signal of ['SIGTERM', 'SIGINT'] as const) process.on(signal, () => void stop());
