import { createConnection } from 'node:net';
import { join } from 'node:path';
import { projectDir } from './project';
import { answersHttp, type RunningProcess, startProcess, waitUntilReady } from './processes';

/** The fixed key pair of s3rver, which checks neither. */
export const fakeStoreKeys = { accessKeyId: 'S3RVER', secretAccessKey: 'S3RVER' } as const;

/** The bucket the product keeps everything in. */
export const bucketName = 'midfoot';

/** Starts the stand-in for an S3 store with its objects under `dir`, and waits until it answers. */
export async function startObjectStore(options: {
  dir: string;
  port: number;
  logFile: string;
}): Promise<RunningProcess> {
  const started = await startProcess({
    name: 'Object store',
    command: process.execPath,
    args: [
      '--openssl-legacy-provider',
      ...program('object-store.ts'),
      ...['--dir', options.dir, '--port', String(options.port), '--bucket', bucketName],
    ],
    env: { PATH: process.env['PATH'] },
    cwd: projectDir,
    logFile: options.logFile,
  });
  return ready(started, () => answersHttp(`http://127.0.0.1:${String(options.port)}/`));
}

/** Starts the stand-in for a mail service with its mailbox under `dir`, and waits until both its ports answer. */
export async function startMailFake(options: {
  dir: string;
  smtpPort: number;
  mailboxPort: number;
  logFile: string;
}): Promise<RunningProcess> {
  const started = await startProcess({
    name: 'Mail fake',
    command: process.execPath,
    args: [
      ...program('smtp.ts'),
      ...['--dir', options.dir],
      ...['--smtp-port', String(options.smtpPort), '--mailbox-port', String(options.mailboxPort)],
    ],
    env: { PATH: process.env['PATH'] },
    cwd: projectDir,
    logFile: options.logFile,
  });
  return ready(
    started,
    async () =>
      (await answersHttp(`http://127.0.0.1:${String(options.mailboxPort)}/`)) &&
      (await acceptsTcp(options.smtpPort)),
  );
}

async function ready(started: RunningProcess, isReady: () => Promise<boolean>): Promise<RunningProcess> {
  try {
    await waitUntilReady(started, isReady, 30_000);
    return started;
  } catch (error) {
    await started.stop();
    throw error;
  }
}

function program(name: string): string[] {
  return ['--import', 'tsx', join(projectDir, 'server', 'fakes', name)];
}

function acceptsTcp(port: number): Promise<boolean> {
  return new Promise((resolve) => {
    const socket = createConnection({ port, host: '127.0.0.1' });
    socket.once('connect', () => {
      socket.destroy();
      resolve(true);
    });
    socket.once('error', () => {
      resolve(false);
    });
  });
}
