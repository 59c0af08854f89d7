import { readConfig } from '../platform/config';
import { openMailer } from '../platform/mail';
import { openPlatform } from '../platform/open-platform';
import { startWorker } from './worker';

const config = readConfig(process.env);
const { platform, close } = openPlatform(config, 'worker');
const mailer = openMailer(config.smtpUrl, config.mailFrom);
const worker = await startWorker(platform, mailer);

let stopping = false;
async function stop(): Promise<void> {
  if (stopping) return;
  stopping = true;
  await worker.stop();
  mailer.close();
  await close();
}
for (const signal of ['SIGTERM', 'SIGINT'] as const) process.on(signal, () => void stop());
