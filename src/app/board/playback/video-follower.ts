import { signal } from '@angular/core';
import { frameAtMs, frameOfMediaTime, seekSeconds, type FrameRate } from '@calc/frames';
import { correctDrift } from './drift';
import type { PlaybackClock } from './playback-clock';

/** Some browsers drop the frame callback after a seek; then `seeked` has to do. */
const CALLBACK_PATIENCE_MS = 250;
/** Between two corrective jumps, so that a slow machine is not kept seeking. */
const SEEK_PAUSE_MS = 700;

/** What the follower has to know of its clip. */
export interface FollowedClip {
  readonly fps: FrameRate;
  readonly durationMs: number;
  /** Where the clip stands when the clock is at 0, ms of the clip. */
  readonly offsetMs: number;
}

/**
 * Keeps one video element on the clock. Seeks aim at the middle of a frame, because a time on the border between two
 * frames shows one or the other as the browser rounds; the frame callback is asked for before the seek, or it may
 * never come (WICG video-rvfc, issue 53).
 */
export class VideoFollower {
  private seekSerial = 0;
  private lastSeekWallMs = -Infinity;
  private isDestroyed = false;
  private callback = 0;

  /** The frame that the element really shows, from its frame callback; null before the first. */
  readonly shownFrame = signal<number | null>(null);
  /** How far the picture was from the clock at the last frame while playing, ms. */
  readonly driftMs = signal(0);

  constructor(
    private readonly name: string,
    private readonly video: HTMLVideoElement,
    private readonly clock: PlaybackClock,
    private clip: FollowedClip,
  ) {
    video.addEventListener('waiting', this.stalled);
    video.addEventListener('playing', this.flows);
    this.watch();
  }

  /** Takes another offset over and shows the frame that is now due. */
  update(clip: FollowedClip): void {
    const isMoved = clip.offsetMs !== this.clip.offsetMs;
    this.clip = clip;
    if (isMoved) void this.goTo(this.clock.positionMs());
  }

  /** Shows the frame due at a position of the clock and tells the clock when it is there. */
  async goTo(positionMs: number): Promise<void> {
    const serial = ++this.seekSerial;
    const { fps } = this.clip;
    const clipMs = this.within(positionMs + this.clip.offsetMs);
    const frame = Math.min(frameAtMs(Math.round(clipMs), fps), this.lastFrame());
    this.clock.hold(this.name);
    await this.showFrame(frame);
    if (serial !== this.seekSerial || this.isDestroyed) return;
    // Once, because an element may land one frame beside where it was asked to go.
    if (this.shownFrame() !== null && this.shownFrame() !== frame) await this.showFrame(frame);
    if (serial === this.seekSerial && !this.isDestroyed) this.clock.release(this.name);
  }

  /** Starts or stops the element as the clock does; called whenever the clock changes its mind. */
  async follow(isPlaying: boolean, speed: number): Promise<void> {
    if (!isPlaying || this.isOutside()) {
      this.video.pause();
      return;
    }
    this.video.playbackRate = speed;
    try {
      await this.video.play();
    } catch (error) {
      // A pause that follows at once ends the promise of play; that is no error. Anything else stops the clock.
      if (!(error instanceof DOMException && error.name === 'AbortError')) this.clock.pause();
    }
  }

  destroy(): void {
    this.isDestroyed = true;
    this.video.removeEventListener('waiting', this.stalled);
    this.video.removeEventListener('playing', this.flows);
    if (this.callback && 'cancelVideoFrameCallback' in this.video) {
      this.video.cancelVideoFrameCallback(this.callback);
    }
    this.clock.release(this.name);
    this.clock.release(`${this.name} stalled`);
  }

  private readonly stalled = (): void => {
    if (this.clock.isPlaying() && !this.video.seeking) this.clock.hold(`${this.name} stalled`);
  };
  private readonly flows = (): void => this.clock.release(`${this.name} stalled`);

  private lastFrame(): number {
    const { fps, durationMs } = this.clip;
    return Math.max(0, Math.round((durationMs * fps.num) / (1000 * fps.den)) - 1);
  }

  private within(clipMs: number): number {
    return Math.min(this.clip.durationMs, Math.max(0, clipMs));
  }

  /** The clip has not begun yet, or is over, while the other view still runs. */
  private isOutside(): boolean {
    const clipMs = this.clock.positionMs() + this.clip.offsetMs;
    return clipMs < 0 || clipMs >= this.clip.durationMs;
  }

  private showFrame(frame: number): Promise<void> {
    const { video } = this;
    this.lastSeekWallMs = performance.now();
    return new Promise((resolve) => {
      let callback = 0;
      const done = (): void => {
        clearTimeout(timer);
        video.removeEventListener('seeked', arrived);
        if (callback && 'cancelVideoFrameCallback' in video) video.cancelVideoFrameCallback(callback);
        resolve();
      };
      const arrived = (): void => {
        if (!('requestVideoFrameCallback' in video)) done();
      };
      const timer = setTimeout(() => {
        if (video.seeking) video.addEventListener('seeked', done, { once: true });
        else done();
      }, CALLBACK_PATIENCE_MS);
      video.addEventListener('seeked', arrived);
      if ('requestVideoFrameCallback' in video) {
        callback = video.requestVideoFrameCallback((_now, { mediaTime }) => {
          this.shownFrame.set(frameOfMediaTime(mediaTime, this.clip.fps));
          done();
        });
      }
      video.currentTime = seekSeconds(frame, this.clip.fps);
    });
  }

  /** Looks at every frame that is shown; while playing, its instant is held against the clock. */
  private watch(): void {
    if (!('requestVideoFrameCallback' in this.video)) return;
    this.callback = this.video.requestVideoFrameCallback((_now, { mediaTime, expectedDisplayTime }) => {
      if (this.isDestroyed) return;
      this.shownFrame.set(frameOfMediaTime(mediaTime, this.clip.fps));
      if (this.clock.isPlaying() && !this.video.paused) this.correct(mediaTime * 1000, expectedDisplayTime);
      this.watch();
    });
  }

  private correct(shownMs: number, wallMs: number): void {
    const speed = this.clock.speed();
    const frameMs = (1000 * this.clip.fps.den) / this.clip.fps.num;
    // A frame stands for its whole length, so its middle is held against the clock.
    const drift = shownMs + frameMs / 2 - (this.clock.at(wallMs) + this.clip.offsetMs);
    this.driftMs.set(drift);
    const correction = correctDrift(drift, frameMs);
    if (correction.kind === 'seek') {
      if (performance.now() - this.lastSeekWallMs > SEEK_PAUSE_MS) void this.goTo(this.clock.positionMs());
      return;
    }
    const rate = speed * (correction.kind === 'rate' ? correction.factor : 1);
    if (this.video.playbackRate !== rate) this.video.playbackRate = rate;
  }
}
