import { readFile, writeFile } from 'node:fs/promises';
import { createServer } from 'node:net';

/** Tells whether nothing listens on `port` of `host` (loopback unless told otherwise). */
export function isPortFree(port: number, host = '127.0.0.1'): Promise<boolean> {
  return new Promise((resolve, reject) => {
    const probe = createServer();
    probe.once('error', (error: NodeJS.ErrnoException) => {
      if (error.code === 'EADDRINUSE') resolve(false);
      else reject(error);
    });
    probe.listen({ port, host, exclusive: true }, () => {
      probe.close(() => {
        resolve(true);
      });
    });
  });
}

/** A loopback port the kernel calls free now; the caller should bind it soon. */
export function freePort(): Promise<number> {
  return new Promise((resolve, reject) => {
    const probe = createServer();
    probe.once('error', reject);
    probe.listen({ port: 0, host: '127.0.0.1' }, () => {
      const address = probe.address();
      probe.close(() => {
        if (address !== null && typeof address === 'object') resolve(address.port);
        else reject(new Error('The kernel gave no port.'));
      });
    });
  });
}

/**
 * One loopback port for each name, all different. A port remembered in `file` (JSON, name → port) is kept while
 * it is free; the choice is written back, so addresses stay the same from one start to the next.
 */
export async function rememberedPorts<Name extends string>(
  file: string,
  names: readonly Name[],
): Promise<Record<Name, number>> {
  const remembered = await readPorts(file);
  const taken = new Set<number>();
  const chosen = {} as Record<Name, number>;
  for (const name of names) {
    let port = remembered[name];
    while (port === undefined || taken.has(port) || !(await isPortFree(port))) port = await freePort();
    taken.add(port);
    chosen[name] = port;
  }
  await writeFile(file, `${JSON.stringify(chosen, null, 2)}\n`);
  return chosen;
}

async function readPorts(file: string): Promise<Record<string, number | undefined>> {
  let text: string;
  try {
    text = await readFile(file, 'utf8');
  } catch (error) {
    if ((error as NodeJS.ErrnoException).code === 'ENOENT') return {};
    throw error;
  }
  try {
    const parsed: unknown = JSON.parse(text);
    if (parsed === null || typeof parsed !== 'object') return {};
    return Object.fromEntries(
      Object.entries(parsed).filter((entry): entry is [string, number] => Number.isInteger(entry[1])),
    );
  } catch {
    // A start killed while writing leaves half a file. Ports are only a convenience: choose them anew.
    return {};
  }
}
