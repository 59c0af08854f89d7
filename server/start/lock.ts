import { spawn } from 'node:child_process';
import { once } from 'node:events';

/** A lock that is held until it is released or this process ends, however it ends. */
export interface Lock {
  release(): Promise<void>;
}

/**
 * Takes the kernel's lock on `file`, which is made when missing. The holder is a small `flock` process that lives
 * as long as the pipe to it, so a killed owner leaves no lock behind.
 * @param wait whether to wait for another owner, or how many seconds; undefined comes back when there still is one
 */
export async function takeLock(file: string, wait: boolean | number): Promise<Lock | undefined> {
  const holder = spawn(
    'flock',
    ['--no-fork', ...patience(wait), '--conflict-exit-code', '75', file, 'sh', '-c', 'echo held; exec cat'],
    // A group of its own: Ctrl-C on the terminal must not take the lock away before we have stopped everything.
    { stdio: ['pipe', 'pipe', 'inherit'], detached: true },
  );
  const ended = once(holder, 'exit') as Promise<[number | null]>;
  const held = once(holder.stdout, 'data').then(() => undefined);
  const result = await Promise.race([held, ended]);
  if (result !== undefined) {
    const [code] = result;
    if (code === 75) return undefined;
    throw new Error(`The lock ${file} could not be taken (flock ended with ${String(code)}).`);
  }
  return {
    release: async () => {
      holder.stdin.end();
      await ended;
    },
  };
}

function patience(wait: boolean | number): string[] {
  if (typeof wait === 'number') return ['--wait', String(wait)];
  return wait ? [] : ['--nonblock'];
}
