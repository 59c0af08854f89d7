import { ChangeDetectionStrategy, Component, computed, input, output } from '@angular/core';
import type { CommentDto } from '@contract';
import type { FrameRate } from '@calc/frames';
import { clipTime } from '../shared/times/time-words';
import type { RepMark } from './board-api';
import { frameSpoken, frameWords, speedWords } from './playback/frame-words';
import type { Span } from './playback/playback-clock';
import { railPercent, railTicks } from './rail-scale';

/** The time line of both views: the film, the comments as pins, the reps, the stretch that repeats, the plumb line. */
@Component({
  selector: 'mf-rail',
  template: `
    <div class="pins">
      @for (comment of comments(); track comment.id) {
        @if (comment.endMs; as endMs) {
          <span
            class="stretch"
            [style.left.%]="percent(comment.atMs)"
            [style.width.%]="percent(endMs) - percent(comment.atMs)"
          ></span>
        }
        <button
          type="button"
          class="pin"
          [class.here]="comment.id === openId()"
          [style.left.%]="percent(comment.atMs)"
          [attr.aria-label]="pinLabel(comment)"
          [title]="comment.body"
          (click)="opened.emit(comment)"
        >
          {{ initial(comment) }}
        </button>
      }
    </div>
    <div class="track">
      <div class="film" [style.background-image]="filmImage()"></div>
      @for (tick of ticks(); track tick) {
        <span class="tick" [style.left.%]="percent(tick)"></span>
      }
      @if (loop(); as span) {
        <span
          class="loop"
          [style.left.%]="percent(span.startMs)"
          [style.width.%]="percent(span.endMs) - percent(span.startMs)"
        ></span>
      }
      @for (mark of repMarks(); track $index) {
        <span class="rep" [class.bottom]="mark.kind === 'bottom'" [style.left.%]="percent(mark.atMs)"></span>
      }
      <span class="plumb" [style.left.%]="percent(positionMs())" aria-hidden="true"></span>
      <input
        type="range"
        min="0"
        [max]="durationMs()"
        step="1"
        [value]="positionMs()"
        aria-label="Place in the clips"
        [attr.aria-valuetext]="spoken()"
        (input)="scrub($event)"
      />
    </div>
    <div class="foot mf-figures">
      <span class="now">{{ words() }}</span>
      <span>{{ state() }}</span>
    </div>
  `,
  styleUrl: './rail.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class Rail {
  readonly durationMs = input.required<number>();
  readonly positionMs = input.required<number>();
  readonly fps = input.required<FrameRate>();
  readonly speed = input(1);
  readonly loop = input<Span | null>(null);
  readonly comments = input<readonly CommentDto[]>([]);
  readonly openId = input<string | null>(null);
  readonly repMarks = input<readonly RepMark[]>([]);
  readonly filmstrip = input<string | null>(null);
  readonly sought = output<number>();
  readonly opened = output<CommentDto>();

  protected readonly ticks = computed(() => railTicks(this.durationMs()));
  protected readonly filmImage = computed(() => {
    const url = this.filmstrip();
    return url ? `url("${url}")` : null;
  });
  protected readonly words = computed(() => frameWords(this.positionMs(), this.fps()));
  protected readonly spoken = computed(() => frameSpoken(this.positionMs(), this.fps()));
  protected readonly state = computed(() => {
    const span = this.loop();
    const speed = speedWords(this.speed());
    return span ? `${speed} · repeats ${clipTime(span.startMs)} to ${clipTime(span.endMs)}` : speed;
  });

  protected percent(atMs: number): number {
    return railPercent(atMs, this.durationMs());
  }

  protected initial({ author }: CommentDto): string {
    return author.name.slice(0, 1);
  }

  protected pinLabel({ view, atMs, body }: CommentDto): string {
    return `Comment at ${clipTime(atMs)} on the ${view}: ${body}`;
  }

  protected scrub(event: Event): void {
    this.sought.emit(Number((event.target as HTMLInputElement).value));
  }
}
