import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import type { ClipDto, LiftDto, View } from '@contract';
import { BriefFigure } from '../brief-figure/brief-figure';
import { Poster } from '../poster/poster';
import { distanceM, phoneHeight, phoneWords } from '../take-words/brief-words';

/** One view of a take as a large upright slot: how to film it while it is missing, its still once it has arrived. */
@Component({
  selector: 'mf-film-slot',
  imports: [BriefFigure, Poster],
  host: { '[class.empty]': '!clip()', '[class.unplayable]': 'clip()?.state === "unplayable"' },
  template: `
    @if (clip(); as clip) {
      <mf-poster [src]="clip.media?.poster ?? null" [alt]="alt()">
        <span class="words">
          <strong>{{ name() }}</strong>
          <span class="mf-figures">{{ clipWords() }}</span>
        </span>
      </mf-poster>
    } @else {
      <mf-brief-figure [view]="view()" [height]="height()" [distanceM]="distance()" />
      <strong>{{ call() }}</strong>
      <span class="how">{{ how() }}</span>
    }
  `,
  styles: `
    :host {
      position: relative;
      display: flex;
      flex-direction: column;
      aspect-ratio: 3 / 4;
      overflow: hidden;
      border-radius: var(--mf-radius-l);
    }

    :host(.empty) {
      justify-content: flex-end;
      gap: var(--mf-space-1);
      padding: var(--mf-space-3);
      color: var(--mat-sys-on-primary-container);
      text-align: center;
      background: var(--mf-spruce-wash);
      border: 2px dashed var(--mat-sys-primary);
    }

    :host(.empty) strong {
      font-size: 1.125rem;
      line-height: 1.2;
    }

    .how {
      font-size: var(--mf-text-s);
      line-height: 1.3;
    }

    mf-brief-figure {
      flex: 1;
      display: grid;
      align-content: center;
      min-height: 0;
    }

    mf-poster {
      flex: 1;
      aspect-ratio: auto;
      border-radius: 0;
    }

    .words {
      position: absolute;
      inset: auto 0 0;
      display: flex;
      flex-direction: column;
      padding: 44px var(--mf-space-3) var(--mf-space-3);
      color: #fff;
      background: linear-gradient(transparent, rgb(14 18 17 / 86%) 60%);
      font-size: var(--mf-text-s);
      line-height: 1.35;
    }

    .words strong {
      font-size: var(--mf-text-m);
    }

    :host(.unplayable) {
      outline: 3px solid var(--mf-tape-mark);
      outline-offset: -3px;
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class FilmSlot {
  readonly view = input.required<View>();
  readonly brief = input.required<LiftDto['brief']>();
  /** The clip that arrived for this view, or null. */
  readonly clip = input<ClipDto | null>(null);

  protected readonly name = computed(() => (this.view() === 'front' ? 'Front' : 'Side'));
  protected readonly call = computed(() => `Film the ${this.view()}`);
  protected readonly how = computed(() => phoneWords(this.brief()));
  protected readonly height = computed(() => phoneHeight(this.brief().cameraHeightCm));
  protected readonly distance = computed(() => distanceM(this.brief().cameraDistanceCm));
  protected readonly alt = computed(() => `Your ${this.view()} clip`);
  protected readonly clipWords = computed(() => {
    const clip = this.clip();
    if (clip?.state === 'unplayable') return 'cannot be played';
    const seconds = clip?.durationMs ? `${(clip.durationMs / 1000).toFixed(1)} s · ` : '';
    return clip?.state === 'ready' ? `${seconds}arrived` : 'arrived; being prepared';
  });
}
