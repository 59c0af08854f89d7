import {
  ChangeDetectionStrategy,
  Component,
  computed,
  effect,
  ElementRef,
  inject,
  DestroyRef,
  input,
  output,
  signal,
  untracked,
  viewChild,
} from '@angular/core';
import type { ClipDto, Drawing, MeasureDto, Point } from '@contract';
import { DrawingLayer } from '../shared/clip-player/drawing-layer';
import type { PlaybackClock } from './playback/playback-clock';
import { VideoFollower } from './playback/video-follower';

let players = 0;

/** One clip on the board's clock, with what is measured and drawn over it. A press chooses it, or places a point. */
@Component({
  selector: 'mf-board-player',
  imports: [DrawingLayer],
  host: { '[class.active]': 'isActive()', '[class.then]': 'isThen()' },
  template: `
    <div class="frame" [style.--ratio]="ratio()">
      <video
        #video
        [src]="clip().media?.proxy ?? null"
        [poster]="clip().media?.poster ?? null"
        muted
        [muted]="true"
        playsinline
        preload="auto"
        disablepictureinpicture
        tabindex="-1"
        [attr.aria-label]="label()"
        (loadedmetadata)="ready()"
        (error)="isBroken.set(true)"
      ></video>
      @if (drawing(); as drawn) {
        <mf-drawing-layer [drawing]="drawn" [width]="width()" [height]="height()" />
      }
      <svg [attr.viewBox]="'0 0 ' + width() + ' ' + height()" aria-hidden="true" focusable="false">
        @if (hasPlumb()) {
          <path class="plumb" [attr.d]="'M' + width() / 2 + ' 0V' + height()" />
        }
        @for (line of measured(); track line.id) {
          <path class="under" [attr.d]="line.path" />
          <path class="line" [attr.d]="line.path" />
          @for (dot of line.dots; track $index) {
            <circle [attr.cx]="dot[0]" [attr.cy]="dot[1]" [attr.r]="width() / 60" />
          }
        }
      </svg>
      <button
        type="button"
        class="surface"
        [class.placing]="isPlacing()"
        [attr.aria-label]="surfaceLabel()"
        [attr.aria-pressed]="isPlacing() ? null : isActive()"
        (click)="press($event)"
      ></button>
      <span class="chip">{{ label() }}</span>
      @for (line of measured(); track line.id) {
        @if (line.words) {
          <span class="value mf-figures">{{ line.words }}</span>
        }
      }
      @if (isBroken()) {
        <p class="broken" role="alert">This clip cannot be shown just now. Load the page again.</p>
      }
    </div>
  `,
  styleUrl: './board-player.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class BoardPlayer {
  readonly clip = input.required<ClipDto>();
  readonly clock = input.required<PlaybackClock>();
  readonly label = input.required<string>();
  /** Comments, marks and measures go to this clip. */
  readonly isActive = input(false);
  /** A clip of an earlier take, shown for comparison alone. */
  readonly isThen = input(false);
  readonly hasPlumb = input(false);
  /** A press places a point instead of choosing the clip. */
  readonly isPlacing = input(false);
  /** Points placed so far, as fractions of the frame. */
  readonly points = input<readonly Point[]>([]);
  readonly measures = input<readonly MeasureDto[]>([]);
  readonly drawing = input<Drawing | null>(null);
  /** Words beside each measure, by its id. */
  readonly wordsFor = input<(measure: MeasureDto) => string>(() => '');
  readonly chosen = output();
  readonly placed = output<Point>();

  private readonly video = viewChild.required<ElementRef<HTMLVideoElement>>('video');
  private readonly name = `player ${String((players += 1))}`;
  private readonly follower = signal<VideoFollower | null>(null);

  protected readonly isBroken = signal(false);
  protected readonly width = computed(() => this.clip().width ?? 720);
  protected readonly height = computed(() => this.clip().height ?? 1280);
  protected readonly ratio = computed(() => this.width() / this.height());
  protected readonly surfaceLabel = computed(() =>
    this.isPlacing()
      ? `Place a point on the ${this.label()} picture`
      : this.isThen()
        ? this.label()
        : `Speak about the ${this.label()} view`,
  );
  protected readonly measured = computed(() => {
    const place = ([x, y]: Point): Point => [x * this.width(), y * this.height()];
    const line = (id: string, points: readonly Point[], words: string) => {
      const dots = points.map(place);
      return { id, dots, words, path: dots.map(([x, y], i) => `${i === 0 ? 'M' : 'L'}${x} ${y}`).join('') };
    };
    const kept = this.measures().map((one) => line(one.id, one.points, this.wordsFor()(one)));
    return this.points().length > 0 ? [...kept, line('placing', this.points(), '')] : kept;
  });

  constructor() {
    effect(() => {
      const follower = this.follower();
      const { toMs } = this.clock().jump();
      if (follower) untracked(() => void follower.goTo(toMs));
    });
    effect(() => {
      const [follower, isPlaying, speed] = [this.follower(), this.clock().isPlaying(), this.clock().speed()];
      if (follower) untracked(() => void follower.follow(isPlaying, speed));
    });
    inject(DestroyRef).onDestroy(() => this.follower()?.destroy());
  }

  protected ready(): void {
    this.isBroken.set(false);
    const { fps, durationMs } = this.clip();
    this.follower()?.destroy();
    const clip = { fps: fps ?? { num: 30, den: 1 }, durationMs: durationMs ?? 0, offsetMs: 0 };
    this.follower.set(new VideoFollower(this.name, this.video().nativeElement, this.clock(), clip));
  }

  protected press(event: MouseEvent): void {
    if (!this.isPlacing()) {
      this.chosen.emit();
      return;
    }
    const box = (event.currentTarget as HTMLElement).getBoundingClientRect();
    // A press of the keyboard has no place; the middle is where the arrows then start from.
    const isKeyboard = event.detail === 0;
    const share = (at: number, start: number, size: number) =>
      Math.min(1, Math.max(0, isKeyboard ? 0.5 : (at - start) / size));
    this.placed.emit([share(event.clientX, box.left, box.width), share(event.clientY, box.top, box.height)]);
  }
}
