import { readFile, stat, utimes, writeFile } from 'node:fs/promises';
import { connect, createServer } from 'node:net';
import { join } from 'node:path';

/** A port and a file that nothing may touch while hostile files are read. */
export interface Canary {
  port: number;
  path: string;
  /** How often the port was called or the file read since the canary was set up. */
  touches(): Promise<{ connections: number; fileReads: number }>;
  close(): Promise<void>;
}

// Linux notes a read in the access time only if it is not newer than the last change (mount option relatime).
const LONG_AGO = new Date('2001-01-01T00:00:00Z');
const LATER = new Date('2002-01-01T00:00:00Z');

/** Opens a loopback port and lays out a file in `directory`, and watches both. */
export async function setUpCanary(directory: string): Promise<Canary> {
  let connections = 0;
  const server = createServer((socket) => {
    connections++;
    socket.destroy();
  });
  await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', resolve));
  const address = server.address();
  if (address === null || typeof address === 'string') throw new Error('the canary has no port');
  const path = join(directory, 'canary.txt');
  await writeFile(path, 'what nobody may read\n');
  await utimes(path, LONG_AGO, LATER);
  return {
    port: address.port,
    path,
    touches: async () => ({
      connections,
      fileReads: (await stat(path)).atimeMs === LONG_AGO.getTime() ? 0 : 1,
    }),
    close: () =>
      new Promise((resolve, reject) => server.close((error) => (error ? reject(error) : resolve()))),
  };
}

/** Proves that both watches work: reads the file and calls the port, as no jailed program may. */
export async function touchCanary(canary: Canary): Promise<void> {
  await readFile(canary.path);
  await new Promise<void>((resolve, reject) => {
    connect(canary.port, '127.0.0.1')
      .on('error', reject)
      .on('close', () => resolve())
      .resume();
  });
}
