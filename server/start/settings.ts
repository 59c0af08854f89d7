import { readFile } from 'node:fs/promises';
import { networkInterfaces } from 'node:os';
import { join, resolve } from 'node:path';
import { parseEnv } from 'node:util';
import { projectDir } from './project';

/** What the start itself needs to know; the rest of the environment is passed on to the programs. */
export interface StartSettings {
  host: string;
  port: number;
  /** Absolute path of the folder for everything this instance keeps. */
  storageDir: string;
  /** The address people open. */
  publicUrl: string;
  demo: boolean;
  /** The settings as given, by the environment or by the file `.env`. */
  given: NodeJS.ProcessEnv;
}

/** A setting has a value that cannot be used; the message says which and what to write instead. */
export class SettingError extends Error {}

/** The process's environment over the file `.env` of the checkout: what is said at the command line wins. */
export async function givenEnvironment(env: NodeJS.ProcessEnv): Promise<NodeJS.ProcessEnv> {
  let text = '';
  try {
    text = await readFile(join(projectDir, '.env'), 'utf8');
  } catch (error) {
    if ((error as NodeJS.ErrnoException).code !== 'ENOENT') throw error;
  }
  // An empty setting means the same as a missing one.
  return Object.fromEntries(
    Object.entries({ ...parseEnv(text), ...env }).filter(([, value]) => value !== ''),
  );
}

/**
 * Reads the start's own settings out of `given`.
 * @throws SettingError
 */
export function readStartSettings(given: NodeJS.ProcessEnv): StartSettings {
  const host = given['HOST'] ?? '127.0.0.1';
  const port = Number(given['PORT'] ?? '4300');
  if (!Number.isInteger(port) || port < 1 || port > 65_535) {
    throw new SettingError(`PORT is "${given['PORT'] ?? ''}". Give a whole number from 1 to 65535.`);
  }
  const demo = given['DEMO'] ?? '1';
  if (!['0', '1', 'true', 'false'].includes(demo)) {
    throw new SettingError(`DEMO is "${demo}". Give 1 to start with the demo gym, or 0 to start empty.`);
  }
  return {
    host,
    port,
    storageDir: resolve(projectDir, given['STORAGE_DIR'] ?? 'storage'),
    publicUrl: given['PUBLIC_URL'] ?? `http://${reachableHost(host)}:${String(port)}`,
    demo: demo === '1' || demo === 'true',
    given,
  };
}

/** A host that can stand in an address: one that means "every interface" is replaced by one of them. */
function reachableHost(host: string): string {
  if (host === '0.0.0.0' || host === '::') {
    const outside = Object.values(networkInterfaces())
      .flatMap((addresses) => addresses ?? [])
      .find((address) => address.family === 'IPv4' && !address.internal);
    return outside?.address ?? '127.0.0.1';
  }
  return host.includes(':') ? `[${host}]` : host;
}
