import { randomBytes } from 'node:crypto';
import { chmod, mkdir, mkdtemp, readdir, rm } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { startDatabase } from '../../server/start/database';
import { bucketName, fakeStoreKeys, startMailFake, startObjectStore } from '../../server/start/fakes';
import { freePort } from '../../server/start/ports';
import { type RunningProcess } from '../../server/start/processes';

/** Addresses of the services a test may use; plain data, so that it can be handed to another process. */
export interface ServiceAddresses {
  /** A folder for the run's files; gone when the run ends. */
  dir: string;
  database: { port: number; user: string; password: string };
  /** The object store; its keys are not checked. */
  store: { endpoint: string; region: string; bucket: string; accessKeyId: string; secretAccessKey: string };
  /** `smtpUrl` takes mails; `mailboxUrl` lists them (see server/fakes/mail-server.ts). */
  mail: { smtpUrl: string; mailboxUrl: string };
}

/** Services that run, and how to end them. */
export interface RunningServices {
  addresses: ServiceAddresses;
  /** Ends every service and removes the files. */
  stop(): Promise<void>;
}

const dirPrefix = 'midfoot-test-';

/**
 * Starts MariaDB, the object store and the mail fake with files of their own on free ports of loopback. The
 * database account may use every database whose name starts with `midfoot`.
 */
export async function startServices(): Promise<RunningServices> {
  await removeAbandonedDirs();
  const dir = await makeServicesDir();
  const started: RunningProcess[] = [];
  const stop = async () => {
    await Promise.all(started.map((service) => service.stop()));
    await rm(dir, { recursive: true, force: true });
  };
  const password = randomBytes(18).toString('base64url');
  const [databasePort, storePort, smtpPort, mailboxPort] = await differentPorts();
  const results = await Promise.allSettled([
    startDatabase({
      dir: join(dir, 'database'),
      port: databasePort,
      password,
      logFile: join(dir, 'database.log'),
      grantPattern: 'midfoot%',
      relaxedDurability: true,
    }),
    startObjectStore({ dir: join(dir, 'objects'), port: storePort, logFile: join(dir, 'store.log') }),
    startMailFake({ dir: join(dir, 'mail'), smtpPort, mailboxPort, logFile: join(dir, 'mail.log') }),
  ]);
  for (const result of results) if (result.status === 'fulfilled') started.push(result.value);
  const failures = results.flatMap((result) =>
    result.status === 'rejected' ? [result.reason as unknown] : [],
  );
  if (failures.length > 0) {
    await stop();
    throw new AggregateError(
      failures,
      `Services for the tests did not start: ${failures.map(String).join('; ')}`,
    );
  }
  return {
    addresses: {
      dir,
      database: { port: databasePort, user: 'midfoot', password },
      store: {
        endpoint: `http://127.0.0.1:${String(storePort)}`,
        region: 'us-east-1',
        bucket: bucketName,
        ...fakeStoreKeys,
      },
      mail: {
        smtpUrl: `smtp://127.0.0.1:${String(smtpPort)}`,
        mailboxUrl: `http://127.0.0.1:${String(mailboxPort)}/`,
      },
    },
    stop,
  };
}

async function differentPorts(): Promise<[number, number, number, number]> {
  const ports = new Set<number>();
  while (ports.size < 4) ports.add(await freePort());
  return [...ports] as [number, number, number, number];
}

/** The folder's name carries our process number, by which a later run knows that its owner is gone. */
async function makeServicesDir(): Promise<string> {
  const dir = await mkdtemp(join(tmpdir(), `${dirPrefix}${String(process.pid)}-`));
  // Open for passing through: MariaDB gives up root's rights and must still reach its own folder below.
  await chmod(dir, 0o711);
  await mkdir(join(dir, 'work'));
  return dir;
}

async function removeAbandonedDirs(): Promise<void> {
  for (const name of await readdir(tmpdir())) {
    const owner = new RegExp(`^${dirPrefix}(\\d+)-`).exec(name)?.[1];
    if (owner !== undefined && !isAlive(Number(owner))) {
      await rm(join(tmpdir(), name), { recursive: true, force: true });
    }
  }
}

function isAlive(pid: number): boolean {
  try {
    process.kill(pid, 0);
    return true;
  } catch (error) {
    return (error as NodeJS.ErrnoException).code === 'EPERM';
  }
}
