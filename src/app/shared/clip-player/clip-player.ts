import {
  ChangeDetectionStrategy,
  Component,
  computed,
  DestroyRef,
  effect,
  ElementRef,
  inject,
  input,
  output,
  signal,
  untracked,
  viewChild,
} from '@angular/core';
import type { ClipDto, Drawing, View } from '@contract';
import { frameAtMs, frameOfMediaTime, frameStartMs, seekSeconds } from '@calc/frames';
import { Icon } from '../icons/icon';
import { clipTime } from '../times/time-words';
import { DrawingLayer } from './drawing-layer';
import { loopWindow, playable, type Moment } from './loop-window';

/** How near the picture must be to a comment's instant for its drawing to show while the clip runs, ms. */
const DRAWING_NEAR_MS = 180;
const SLOW_RATE = 0.35;

/**
 * A member's player: loops the moment it is given, muted; a tap stops and starts it. Seeking goes to the middle of a
 * frame, so the frame shown is the one meant. Where motion is unwanted it stands at the instant until started.
 */
@Component({
  selector: 'mf-clip-player',
  imports: [DrawingLayer, Icon],
  templateUrl: './clip-player.html',
  styleUrl: './clip-player.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ClipPlayer {
  readonly clips = input.required<readonly ClipDto[]>();
  /** What to show; a new object makes the player go there. */
  readonly moment = input.required<Moment>();
  /** The drawing that belongs to the moment. */
  readonly drawing = input<Drawing | null>(null);
  /** Address of the captions of a view. */
  readonly captionsOf = input<((view: View) => string) | null>(null);
  /** The person turned to another view. */
  readonly turned = output<View>();

  private readonly video = viewChild.required<ElementRef<HTMLVideoElement>>('video');
  private readonly prefersStill = matchMedia('(prefers-reduced-motion: reduce)').matches;
  private wantsPlay = false;
  private frameCallback: number | null = null;

  protected readonly view = signal<View>('front');
  protected readonly atMs = signal(0);
  protected readonly isPlaying = signal(false);
  protected readonly isSlow = signal(false);
  /** Whether only the part around the moment is played, not the whole clip. */
  protected readonly isLooping = signal(true);
  protected readonly isBroken = signal(false);

  protected readonly shown = computed(() => playable(this.clips()));
  protected readonly views = computed(() => this.shown().map((clip) => clip.view));
  protected readonly clip = computed(
    () => this.shown().find((clip) => clip.view === this.view()) ?? this.shown()[0] ?? null,
  );
  protected readonly src = computed(() => this.clip()?.media?.proxy ?? null);
  protected readonly poster = computed(() => this.clip()?.media?.poster ?? null);
  protected readonly ratio = computed(() => `${this.clip()?.width ?? 9} / ${this.clip()?.height ?? 16}`);
  protected readonly durationMs = computed(() => this.clip()?.durationMs ?? 0);
  protected readonly stepMs = computed(() => frameStartMs(1, this.fps()));
  protected readonly clipTime = clipTime;
  protected readonly timeWords = computed(() => `${clipTime(this.atMs())} of ${clipTime(this.durationMs())}`);
  protected readonly hasDrawing = computed(() => {
    const moment = this.moment();
    if (!this.drawing() || moment.view !== this.clip()?.view) return false;
    const lastMs = moment.endMs ?? moment.atMs;
    return this.atMs() > moment.atMs - DRAWING_NEAR_MS && this.atMs() < lastMs + DRAWING_NEAR_MS;
  });
  private readonly window = computed(() => {
    const { view, atMs, endMs } = this.moment();
    const isWhole = !this.isLooping() || view !== this.clip()?.view;
    return isWhole ? { startMs: 0, endMs: this.durationMs() } : loopWindow(atMs, endMs, this.durationMs());
  });
  private readonly fps = computed(() => this.clip()?.fps ?? { num: 30, den: 1 });

  constructor() {
    effect(() => {
      const moment = this.moment();
      untracked(() => this.goTo(moment));
    });
    inject(DestroyRef).onDestroy(() => this.stopWatching());
  }

  protected turn(view: View): void {
    if (view === this.view()) return;
    this.view.set(view);
    this.turned.emit(view);
    this.wantsPlay = this.isPlaying();
    this.atMs.set(view === this.moment().view ? this.moment().atMs : 0);
  }

  /** The file's length is known: go where the player was told to be. */
  protected ready(): void {
    this.isBroken.set(false);
    this.seek(this.atMs());
    const { nativeElement } = this.video();
    nativeElement.playbackRate = this.isSlow() ? SLOW_RATE : 1;
    if (this.wantsPlay) void this.play();
  }

  protected toggle(): void {
    if (this.isPlaying()) this.pause();
    else void this.play();
  }

  protected scrub(event: Event): void {
    this.pause();
    this.seek(Number((event.target as HTMLInputElement).value));
  }

  protected step(frames: number): void {
    this.pause();
    const frame = Math.max(0, frameAtMs(this.atMs(), this.fps()) + frames);
    this.seek(Math.min(frameStartMs(frame, this.fps()), this.durationMs()));
  }

  protected switchSlow(): void {
    this.isSlow.update((isSlow) => !isSlow);
    this.video().nativeElement.playbackRate = this.isSlow() ? SLOW_RATE : 1;
  }

  protected switchLoop(): void {
    this.isLooping.update((isLooping) => !isLooping);
    if (this.isLooping() && this.moment().view !== this.view()) this.turn(this.moment().view);
    else if (this.isLooping()) this.seek(this.window().startMs);
  }

  protected again(): void {
    this.seek(this.window().startMs);
    void this.play();
  }

  protected started(): void {
    this.isPlaying.set(true);
    this.watch();
  }

  protected stopped(): void {
    this.isPlaying.set(false);
  }

  private goTo(moment: Moment): void {
    const isOther = moment.view !== this.view() && this.views().includes(moment.view);
    this.isLooping.set(true);
    const stands = moment.isStill || this.prefersStill;
    this.wantsPlay = !stands;
    if (isOther) this.view.set(moment.view);
    const startMs = stands ? moment.atMs : this.window().startMs;
    this.atMs.set(startMs);
    const element = this.video().nativeElement;
    // Another file, or none read yet: `ready` goes on from here.
    if (isOther || element.readyState < HTMLMediaElement.HAVE_METADATA) return;
    this.seek(startMs);
    if (stands) this.pause();
    else void this.play();
  }

  private seek(atMs: number): void {
    const element = this.video().nativeElement;
    this.atMs.set(atMs);
    if (element.readyState < HTMLMediaElement.HAVE_METADATA) return;
    const last = Math.max(0, (this.clip()?.frames ?? Number.MAX_SAFE_INTEGER) - 1);
    element.currentTime = seekSeconds(Math.min(frameAtMs(atMs, this.fps()), last), this.fps());
  }

  private async play(): Promise<void> {
    this.wantsPlay = true;
    const window = this.window();
    if (this.atMs() >= window.endMs || this.atMs() < window.startMs) this.seek(window.startMs);
    try {
      await this.video().nativeElement.play();
    } catch (error) {
      // A browser that saves power or data may refuse to start by itself; a view turned meanwhile aborts the start.
      if (!(error instanceof DOMException)) throw error;
      this.isPlaying.set(!this.video().nativeElement.paused);
    }
  }

  private pause(): void {
    this.wantsPlay = false;
    this.video().nativeElement.pause();
  }

  /** Follows the frames as they are shown and turns back at the end of the part that loops. */
  private watch(): void {
    this.stopWatching();
    const element = this.video().nativeElement;
    const follow = (mediaTime: number): void => {
      if (!element.seeking) {
        const shownMs = frameStartMs(frameOfMediaTime(mediaTime, this.fps()), this.fps());
        this.atMs.set(Math.min(shownMs, this.durationMs()));
        const { startMs, endMs } = this.window();
        if (!element.paused && shownMs >= endMs - this.stepMs()) this.seek(startMs);
      }
      if (!element.paused)
        this.frameCallback = element.requestVideoFrameCallback((_now, frame) => follow(frame.mediaTime));
    };
    this.frameCallback = element.requestVideoFrameCallback((_now, frame) => follow(frame.mediaTime));
  }

  private stopWatching(): void {
    if (this.frameCallback !== null) this.video().nativeElement.cancelVideoFrameCallback(this.frameCallback);
    this.frameCallback = null;
  }
}
