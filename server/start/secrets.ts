import { randomBytes } from 'node:crypto';
import { chmod, readFile, rename, writeFile } from 'node:fs/promises';

const names = ['databasePassword', 'sessionSecret', 'metricsToken'] as const;

/** Secrets of one instance, made by chance at its first start. */
export type Secrets = Record<(typeof names)[number], string>;

/** Reads the secrets kept in `file` (readable to its owner alone), making those that are not there yet. */
export async function loadSecrets(file: string): Promise<Secrets> {
  const kept = await readSecrets(file);
  const secrets = Object.fromEntries(
    names.map((name) => [name, kept[name] ?? randomBytes(32).toString('base64url')]),
  ) as Secrets;
  const unfinished = `${file}.new`;
  await writeFile(unfinished, `${JSON.stringify(secrets, null, 2)}\n`, { mode: 0o600 });
  await chmod(unfinished, 0o600);
  await rename(unfinished, file);
  return secrets;
}

async function readSecrets(file: string): Promise<Partial<Secrets>> {
  let text: string;
  try {
    text = await readFile(file, 'utf8');
  } catch (error) {
    if ((error as NodeJS.ErrnoException).code === 'ENOENT') return {};
    throw error;
  }
  const parsed = JSON.parse(text) as Record<string, unknown>;
  return Object.fromEntries(
    names.flatMap((name) => (typeof parsed[name] === 'string' ? [[name, parsed[name]]] : [])),
  ) as Partial<Secrets>;
}
