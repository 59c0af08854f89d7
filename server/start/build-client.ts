import { spawn } from 'node:child_process';
import { mkdir } from 'node:fs/promises';
import { join } from 'node:path';
import { buildOutput, hashInputs, isBuilt, takeBuild } from './client-build';
import { takeLock } from './lock';
import { dyingWithUs } from './processes';
import { projectDir } from './project';

/**
 * Builds the client for production, unless the one that stands was made from the same sources. Two instances of one
 * checkout build one after the other.
 * @throws Error when the build fails; what is wrong was printed
 */
export async function buildClient(say: (line: string) => void, signal?: AbortSignal): Promise<void> {
  await mkdir(join(projectDir, 'dist'), { recursive: true });
  const lock = await takeLock(join(projectDir, 'dist', 'build.lock'), true);
  try {
    const hash = await hashInputs(projectDir);
    if (await isBuilt(projectDir, hash)) return;
    say('Building the client (about half a minute) …');
    const output: string[] = [];
    const code = await new Promise<number | null>((resolve, reject) => {
      const build = spawn(
        ...dyingWithUs(process.execPath, [
          ...['node_modules/@angular/cli/bin/ng.js', 'build'],
          ...['--output-path', buildOutput, '--progress=false'],
        ]),
        {
          cwd: projectDir,
          stdio: ['ignore', 'pipe', 'pipe'],
          env: { ...process.env, NG_CLI_ANALYTICS: 'false' },
          ...(signal ? { signal } : {}),
        },
      );
      for (const stream of [build.stdout, build.stderr]) {
        stream.on('data', (chunk: Buffer) => output.push(chunk.toString()));
      }
      build.once('error', reject);
      build.once('exit', resolve);
    });
    if (code !== 0) throw new Error(`The client could not be built:\n${output.join('')}`);
    await takeBuild(projectDir, hash);
  } finally {
    await lock?.release();
  }
}
