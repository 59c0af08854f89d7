import { readFile, rename, writeFile } from 'node:fs/promises';
import { setTimeout as sleep } from 'node:timers/promises';

/** A process as it can be known again later: a number alone may have passed to another program. */
export interface ProcessMark {
  name: string;
  pid: number;
  /** Clock ticks from the machine's boot to the start of the process. */
  startTicks: string;
}

/** When a process was started, in ticks since boot; undefined when there is none with this number. */
export async function startTicks(pid: number): Promise<string | undefined> {
  try {
    const text = await readFile(`/proc/${String(pid)}/stat`, 'utf8');
    // The second field is a name in brackets that may hold spaces; the start time is field 22 (proc(5)).
    const [state, ...rest] = text.slice(text.lastIndexOf(')') + 2).split(' ');
    return state === 'Z' ? undefined : rest[18];
  } catch (error) {
    const { code } = error as NodeJS.ErrnoException;
    if (code === 'ENOENT' || code === 'ESRCH') return undefined;
    throw error;
  }
}

/** Writes down which processes belong to this instance, for the case that we are killed. */
export async function rememberProcesses(file: string, pids: ReadonlyMap<number, string>): Promise<void> {
  const marks: ProcessMark[] = [];
  for (const [pid, name] of pids) {
    const ticks = await startTicks(pid);
    if (ticks !== undefined) marks.push({ name, pid, startTicks: ticks });
  }
  const unfinished = `${file}.new`;
  await writeFile(unfinished, `${JSON.stringify(marks, null, 2)}\n`);
  await rename(unfinished, file);
}

/**
 * Ends what an earlier start left running, politely first. The caller holds the instance's lock, so whoever
 * started these is gone. Answers the names of those it had to end.
 */
export async function endSurvivors(file: string, graceMs = 20_000): Promise<string[]> {
  const survivors: ProcessMark[] = [];
  for (const mark of await readMarks(file)) if (await isSame(mark)) survivors.push(mark);
  for (const mark of survivors) signal(mark.pid, 'SIGTERM');
  const deadline = Date.now() + graceMs;
  for (const mark of survivors) {
    while (await isSame(mark)) {
      if (Date.now() > deadline) signal(-mark.pid, 'SIGKILL');
      await sleep(50);
    }
  }
  return survivors.map((mark) => mark.name);
}

async function isSame(mark: ProcessMark): Promise<boolean> {
  return (await startTicks(mark.pid)) === mark.startTicks;
}

function signal(pid: number, name: NodeJS.Signals): void {
  try {
    process.kill(pid, name);
  } catch (error) {
    if ((error as NodeJS.ErrnoException).code !== 'ESRCH') throw error;
  }
}

async function readMarks(file: string): Promise<ProcessMark[]> {
  try {
    return JSON.parse(await readFile(file, 'utf8')) as ProcessMark[];
  } catch (error) {
    if ((error as NodeJS.ErrnoException).code === 'ENOENT') return [];
    throw error;
  }
}
