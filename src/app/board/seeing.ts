import { computed, effect, Injectable, signal } from '@angular/core';
import { PlaybackClock } from './playback/playback-clock';

/** A repeat without ends of its own takes this much on either side of the picture, ms. */
const LOOP_AROUND_MS = 700;

/** How the clips are looked at: the one clock, the stretch that repeats, the plumb line. Provided by the page. */
@Injectable()
export class Seeing {
  readonly clock = new PlaybackClock(() => performance.now());
  readonly hasPlumb = signal(false);
  /** A comment is about the stretch that repeats, not about one instant. */
  readonly isOverSpan = signal(false);
  /** The stretch a comment is about, when it is about more than an instant. */
  readonly span = computed(() => (this.isOverSpan() ? this.clock.loop() : null));

  constructor() {
    effect((onCleanup) => {
      if (!this.clock.isPlaying()) return;
      const follow = (): void => {
        this.clock.tick();
        frame = requestAnimationFrame(follow);
      };
      let frame = requestAnimationFrame(follow);
      onCleanup(() => cancelAnimationFrame(frame));
    });
  }

  turnPlumb(): void {
    this.hasPlumb.update((has) => !has);
  }

  /** Repeats a stretch around the picture, or stops repeating. */
  turnLoop(): void {
    const { clock } = this;
    const at = clock.positionMs();
    clock.setLoop(
      clock.loop()
        ? null
        : {
            startMs: Math.max(0, at - LOOP_AROUND_MS),
            endMs: Math.min(clock.durationMs(), at + LOOP_AROUND_MS),
          },
    );
  }

  /** Sets one end of the stretch that repeats to the picture that shows. */
  setLoopEnd(end: 'start' | 'end'): void {
    const { clock } = this;
    const at = clock.positionMs();
    const span = clock.loop() ?? { startMs: 0, endMs: clock.durationMs() };
    clock.setLoop(end === 'start' ? { ...span, startMs: at } : { ...span, endMs: at });
  }

  /** Makes the next comment about the stretch that repeats, or about the instant again. */
  turnSpan(): void {
    this.isOverSpan.update((isOver) => !isOver && this.clock.loop() !== null);
  }
}
