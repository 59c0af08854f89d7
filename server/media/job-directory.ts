import { chmod, chown, copyFile, link, mkdtemp } from 'node:fs/promises';
import { join } from 'node:path';

/** The user `nobody`, whom the jail becomes when started as root; the number is fixed by Debian's base-passwd. */
const UNPRIVILEGED_ID = 65534;
/** What the input is called inside a job's directory: ours, so that no uploader's name is ever a path or an option. */
export const SOURCE_NAME = 'source';

/** Lets the jailed program, and no other user, write in the directory. */
export async function openJobDirectory(directory: string): Promise<void> {
  await chmod(directory, 0o700);
  if (process.getuid?.() === 0) await chown(directory, UNPRIVILEGED_ID, UNPRIVILEGED_ID);
}

/**
 * Makes a private directory for one job inside `workDir` with the input in it as {@link SOURCE_NAME}.
 * The input is linked, not copied, where both are on one file system, and made readable (never writable) to all;
 * `workDir` keeps others away from it.
 *
 * @returns the directory's path
 */
export async function makeJobDirectory(workDir: string, inputPath: string): Promise<string> {
  const directory = await mkdtemp(join(workDir, 'job-'));
  await openJobDirectory(directory);
  const source = join(directory, SOURCE_NAME);
  try {
    await link(inputPath, source);
  } catch (error) {
    if ((error as NodeJS.ErrnoException).code === 'ENOENT') throw error;
    await copyFile(inputPath, source);
  }
  await chmod(source, 0o444);
  return directory;
}
