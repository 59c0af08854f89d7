import { createHash } from 'node:crypto';
import { readdir, readFile, rename, rm, writeFile } from 'node:fs/promises';
import { join, relative } from 'node:path';

/** What the built client depends on, from the project's folder. */
const inputs = [
  'src',
  'server/contract',
  'server/calc',
  'angular.json',
  'package-lock.json',
  'tsconfig.json',
  'tsconfig.app.json',
];

const builtDir = join('dist', 'client');
const freshDir = join('dist', 'client.new');
const staleDir = join('dist', 'client.old');
const stampName = 'inputs.sha256';

/** The folder of the built client that is served, from the project's folder. */
export const clientDir = join(builtDir, 'browser');

/** Where a build has to put its output, from the project's folder. */
export const buildOutput = freshDir;

/** A hash over the names and contents of everything the client is built from; specs are no part of it. */
export async function hashInputs(projectDir: string): Promise<string> {
  const hash = createHash('sha256');
  for (const file of await listInputs(projectDir)) {
    const content = await readFile(file);
    hash.update(`${relative(projectDir, file)}\0${String(content.length)}\0`).update(content);
  }
  return hash.digest('hex');
}

/** Tells whether the built client was made from inputs with this hash. */
export async function isBuilt(projectDir: string, hash: string): Promise<boolean> {
  try {
    return (await readFile(join(projectDir, builtDir, stampName), 'utf8')) === hash;
  } catch (error) {
    if ((error as NodeJS.ErrnoException).code === 'ENOENT') return false;
    throw error;
  }
}

/**
 * Puts a finished build in the place of the one before. Building beside it keeps another instance of the same
 * checkout served, and a build that was cut off leaves no half client.
 */
export async function takeBuild(projectDir: string, hash: string): Promise<void> {
  const [fresh, built, stale] = [freshDir, builtDir, staleDir].map((dir) => join(projectDir, dir)) as [
    string,
    string,
    string,
  ];
  await writeFile(join(fresh, stampName), hash);
  await rm(stale, { recursive: true, force: true });
  try {
    await rename(built, stale);
  } catch (error) {
    if ((error as NodeJS.ErrnoException).code !== 'ENOENT') throw error;
  }
  await rename(fresh, built);
  await rm(stale, { recursive: true, force: true });
}

async function listInputs(projectDir: string): Promise<string[]> {
  const files: string[] = [];
  for (const input of inputs) {
    const path = join(projectDir, input);
    try {
      for (const entry of await readdir(path, { recursive: true, withFileTypes: true })) {
        if (entry.isFile() && !entry.name.endsWith('.spec.ts'))
          files.push(join(entry.parentPath, entry.name));
      }
    } catch (error) {
      if ((error as NodeJS.ErrnoException).code !== 'ENOTDIR') throw error;
      files.push(path);
    }
  }
  return files.sort();
}
