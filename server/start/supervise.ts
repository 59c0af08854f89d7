import { setTimeout as sleep } from 'node:timers/promises';
import { logTail, type RunningProcess } from './processes';

/** Pauses before starting a program again: doubled each time it ends soon after its start. */
const firstPauseMs = 500;
const longestPauseMs = 30_000;
/** A program that ran this long was well: its next end counts as the first. */
const wellAfterMs = 60_000;

/** How a supervisor tells what happens. */
export interface SupervisorEvents {
  say(line: string): void;
  /** Called whenever the set of running processes has changed. */
  changed(): Promise<void>;
}

/** Keeps programs running: each is started again when it ends, until all are stopped. */
export class Supervisor {
  private readonly current: (RunningProcess | undefined)[] = [];
  private readonly stopping = new AbortController();

  constructor(private readonly events: SupervisorEvents) {}

  /** Numbers and names of the programs that run now. */
  processes(): Map<number, string> {
    return new Map(this.current.flatMap((one) => (one?.isAlive() === true ? [[one.pid, one.name]] : [])));
  }

  /** Starts a program; fails when its first start fails. */
  async keep(start: () => Promise<RunningProcess>): Promise<void> {
    this.stopping.signal.throwIfAborted();
    const place = this.current.push(undefined) - 1;
    const first = await this.begin(place, start);
    void this.watch(place, first, start);
  }

  /** Stops the programs, the youngest first, and starts none again. */
  async stop(): Promise<void> {
    this.stopping.abort();
    for (const one of this.current.toReversed()) await one?.stop();
  }

  private async begin(place: number, start: () => Promise<RunningProcess>): Promise<RunningProcess> {
    const started = await start();
    this.current[place] = started;
    // Asked to stop while this one was starting: nobody else knows of it yet.
    if (this.stopping.signal.aborted) await started.stop();
    await this.events.changed();
    return started;
  }

  private async watch(
    place: number,
    first: RunningProcess,
    start: () => Promise<RunningProcess>,
  ): Promise<void> {
    let pauseMs = firstPauseMs;
    let running: RunningProcess | undefined = first;
    let startedAt = Date.now();
    const { name, logFile } = first;
    for (;;) {
      const end = await running?.ended;
      if (this.stopping.signal.aborted) return;
      if (end !== undefined) {
        if (Date.now() - startedAt > wellAfterMs) pauseMs = firstPauseMs;
        this.events.say(
          `${name} ended (${end.signal ?? `exit ${String(end.code)}`}); starting it again.${await logTail(logFile, 5)}`,
        );
      }
      try {
        await sleep(pauseMs, undefined, { signal: this.stopping.signal });
      } catch {
        return; // Stopped during the pause.
      }
      pauseMs = Math.min(pauseMs * 2, longestPauseMs);
      startedAt = Date.now();
      try {
        running = await this.begin(place, start);
      } catch (error) {
        running = undefined;
        this.events.say(`${error instanceof Error ? error.message : String(error)}\n  Trying again.`);
      }
    }
  }
}
