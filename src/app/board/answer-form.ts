import { ChangeDetectionStrategy, Component, computed, inject, input, output } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { TOP_CUE_MAX, VIEWS, type DraftAnswer, type LiftDto, type View } from '@contract';
import { firstName } from '../shared/take-words/take-words';
import { GymZone } from '../shared/times/gym-zone';
import { KeyCap } from '../shared/key-cap/key-cap';
import { instantOfWall, wallTime } from '../shared/times/wall-time';
import { AnswerPreview } from './answer-preview';
import { CALL_LABELS, missingWords } from './board-words';
import type { Saving } from './board-store';

const CALLS = ['go', 'light', 'scale'] as const;

/** The answer itself: the one thing to change, the load, another take, and sending. */
@Component({
  selector: 'mf-answer-form',
  imports: [AnswerPreview, KeyCap, MatButton],
  templateUrl: './answer-form.html',
  styleUrl: './answer-form.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class AnswerForm {
  private readonly gym = inject(GymZone);

  readonly draft = input.required<DraftAnswer>();
  readonly lift = input.required<LiftDto>();
  readonly memberName = input.required<string>();
  readonly saving = input.required<Saving>();
  readonly isSending = input(false);
  readonly isReadOnly = input(false);
  /** Cues of the faults marked as seen, offered as the top cue. */
  readonly cues = input<readonly string[]>([]);
  /** How many comments go with the answer. */
  readonly commentCount = input(0);
  readonly said = output<Partial<DraftAnswer>>();
  readonly sent = output();

  protected readonly calls = CALLS;
  protected readonly callLabels = CALL_LABELS;
  protected readonly views = VIEWS;
  protected readonly cueMax = TOP_CUE_MAX;
  protected readonly missing = computed(() => missingWords(this.draft(), this.lift()));
  protected readonly first = computed(() => firstName(this.memberName()));
  protected readonly by = computed(() => {
    const by = this.draft().refilm?.by;
    return by ? wallTime(Date.parse(by), this.gym.zone()) : '';
  });
  protected readonly savingWords = computed(() => {
    switch (this.saving()) {
      case 'pending':
        return 'Keeping …';
      case 'saved':
        return 'Kept. You can leave and come back.';
      case 'failed':
        return 'Not kept on the server yet; it stays in this browser.';
      case 'nothing':
        return '';
    }
  });

  protected value(event: Event): string {
    return (event.target as HTMLInputElement).value;
  }

  protected askAgain(event: Event): void {
    const isOn = (event.target as HTMLInputElement).checked;
    this.said.emit({ refilm: isOn ? { views: [...this.lift().brief.views] } : null });
  }

  protected turnView(view: View): void {
    const refilm = this.draft().refilm;
    if (!refilm) return;
    const views = refilm.views.includes(view)
      ? refilm.views.filter((one) => one !== view)
      : VIEWS.filter((one) => one === view || refilm.views.includes(one));
    this.said.emit({ refilm: { ...refilm, views } });
  }

  protected sayBy(event: Event): void {
    const refilm = this.draft().refilm;
    if (!refilm) return;
    const atMs = instantOfWall(this.value(event), this.gym.zone());
    this.said.emit({ refilm: { ...refilm, by: Number.isNaN(atMs) ? null : new Date(atMs).toISOString() } });
  }

  protected sayNote(event: Event): void {
    const refilm = this.draft().refilm;
    if (refilm) this.said.emit({ refilm: { ...refilm, note: this.value(event) } });
  }
}
