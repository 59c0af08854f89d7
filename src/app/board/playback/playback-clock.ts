import { computed, signal } from '@angular/core';
import { frameAtMs, frameStartMs, type FrameRate } from '@calc/frames';

/** Speeds offered, slowest first. */
export const SPEEDS = [0.1, 0.25, 0.5, 1] as const;
export type Speed = (typeof SPEEDS)[number];

/** A stretch of the clock, ms; `endMs` is after `startMs`. */
export interface Span {
  readonly startMs: number;
  readonly endMs: number;
}

/** A jump that every player has to follow; `serial` tells one jump from the next. */
export interface Jump {
  readonly serial: number;
  readonly toMs: number;
}

/** Loops shorter than this cannot be seen, ms. */
const SHORTEST_LOOP_MS = 100;

/**
 * The one time of the board, ms from the start of the clips. Players follow it; nothing here knows a video element.
 * It stands still while any player is held (seeking, stalled), so that the views stay together.
 */
export class PlaybackClock {
  private readonly held = new Set<string>();
  /** Where the clock stood at a wall time, while it runs. */
  private anchor: { readonly positionMs: number; readonly wallMs: number } | null = null;

  readonly positionMs = signal(0);
  readonly isPlaying = signal(false);
  readonly speed = signal<Speed>(1);
  readonly loop = signal<Span | null>(null);
  readonly durationMs = signal(0);
  readonly jump = signal<Jump>({ serial: 0, toMs: 0 });
  readonly isAtEnd = computed(() => this.durationMs() > 0 && this.positionMs() >= this.durationMs());

  /** @param now the wall clock, ms, running evenly */
  constructor(private readonly now: () => number) {}

  /** Where the clock stands at a wall time (ms of the same wall clock); for players that ask between ticks. */
  at(wallMs: number): number {
    if (!this.anchor) return this.positionMs();
    return this.anchor.positionMs + (wallMs - this.anchor.wallMs) * this.speed();
  }

  play(): void {
    if (this.isPlaying()) return;
    if (this.isAtEnd()) this.seek(this.loop()?.startMs ?? 0);
    this.isPlaying.set(true);
    this.run();
  }

  pause(): void {
    if (!this.isPlaying()) return;
    this.tick();
    this.anchor = null;
    this.isPlaying.set(false);
  }

  toggle(): void {
    if (this.isPlaying()) this.pause();
    else this.play();
  }

  /** Jumps; a running clock goes on once every player has arrived. */
  seek(toMs: number): void {
    const position = Math.min(this.durationMs(), Math.max(0, toMs));
    this.anchor = null;
    this.positionMs.set(position);
    this.jump.update(({ serial }) => ({ serial: serial + 1, toMs: position }));
    this.run();
  }

  /**
   * Moves by whole frames of one view and pauses.
   * @param by frames, negative for back
   * @param offsetMs where the view's clip stands when the clock is at 0, ms of the clip
   */
  step(by: number, fps: FrameRate, offsetMs = 0): void {
    this.pause();
    const frame = Math.max(0, frameAtMs(Math.round(this.positionMs() + offsetMs), fps) + by);
    this.seek(frameStartMs(frame, fps) - offsetMs);
  }

  setSpeed(speed: Speed): void {
    this.tick();
    this.speed.set(speed);
    this.anchor = null;
    this.run();
  }

  /** One speed up (1) or down (-1). */
  shiftSpeed(by: 1 | -1): void {
    const next = SPEEDS[SPEEDS.indexOf(this.speed()) + by];
    if (next !== undefined) this.setSpeed(next);
  }

  /** Repeats a stretch, or nothing. A running clock outside it jumps to its start at the next tick. */
  setLoop(span: Span | null): void {
    const isLong = span !== null && span.endMs - span.startMs >= SHORTEST_LOOP_MS;
    this.loop.set(isLong ? span : null);
  }

  /** Makes time stand still until `who` lets go. */
  hold(who: string): void {
    this.tick();
    this.held.add(who);
    this.anchor = null;
  }

  release(who: string): void {
    if (this.held.delete(who)) this.run();
  }

  /** Brings the position up to the wall clock; called for every picture of the screen while playing. */
  tick(): void {
    if (!this.anchor) return;
    const position = this.at(this.now());
    const loop = this.loop();
    if (loop && (position >= loop.endMs || position < loop.startMs - SHORTEST_LOOP_MS)) {
      this.seek(loop.startMs);
    } else if (position >= this.durationMs()) {
      this.anchor = null;
      this.positionMs.set(this.durationMs());
      this.isPlaying.set(false);
    } else {
      this.positionMs.set(position);
    }
  }

  private run(): void {
    if (!this.isPlaying() || this.held.size > 0 || this.anchor) return;
    this.anchor = { positionMs: this.positionMs(), wallMs: this.now() };
  }
}
