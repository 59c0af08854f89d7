import { ChangeDetectionStrategy, Component, computed, input } from '@angular/core';
import { durationWords } from '../times/time-words';
import { byteWords } from './byte-words';

/** Where a clip is on its way. `stopped` waits for the network and goes on by itself. */
export type UploadStage = 'sending' | 'stopped' | 'processing' | 'done';

/** How far a clip is: bytes and time left while it is sent, stage and per cent while it is processed. */
@Component({
  selector: 'mf-upload-progress',
  template: `
    <p class="words">
      <span>{{ words() }}</span>
      <span class="mf-figures">{{ percent() }} %</span>
    </p>
    <div
      class="track"
      role="progressbar"
      aria-valuemin="0"
      aria-valuemax="100"
      [attr.aria-label]="label()"
      [attr.aria-valuenow]="percent()"
      [attr.aria-valuetext]="words()"
    >
      <div class="line" [class]="stage()" [style.width.%]="percent()"></div>
    </div>
  `,
  styles: `
    .words {
      display: flex;
      justify-content: space-between;
      gap: var(--mf-space-3);
      max-width: none;
      margin-bottom: var(--mf-space-1);
      font-size: var(--mf-text-s);
    }

    .track {
      height: 6px;
      overflow: hidden;
      background: var(--mf-mist);
      border-radius: 3px;
    }

    .line {
      height: 100%;
      background: var(--mat-sys-primary);
      transition: width 0.2s linear;
    }

    .line.stopped {
      background: repeating-linear-gradient(90deg, var(--mf-tape-mark) 0 8px, transparent 8px 14px);
    }
  `,
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class UploadProgress {
  /** Which clip, for screen readers. */
  readonly label = input.required<string>();
  readonly stage = input.required<UploadStage>();
  readonly sentBytes = input(0);
  readonly totalBytes = input(0);
  /** The time that sending still needs, when it can be told. */
  readonly leftMs = input<number | null>(null);
  /** Per cent of the processing, 0 to 100. */
  readonly processedPercent = input(0);

  protected readonly percent = computed(() => {
    if (this.stage() === 'done') return 100;
    if (this.stage() === 'processing') return Math.round(Math.min(100, this.processedPercent()));
    return this.totalBytes() > 0 ? Math.floor(Math.min(1, this.sentBytes() / this.totalBytes()) * 100) : 0;
  });
  protected readonly words = computed(() => {
    const bytes = `${byteWords(this.sentBytes())} of ${byteWords(this.totalBytes())}`;
    const leftMs = this.leftMs();
    switch (this.stage()) {
      case 'sending':
        return leftMs === null ? `Sending: ${bytes}` : `Sending: ${bytes}, ${durationWords(leftMs)} left`;
      case 'stopped':
        return `Waiting for the network: ${bytes} are safe`;
      case 'processing':
        return 'It has arrived; getting it ready. You can put the phone away';
      case 'done':
        return 'Ready';
    }
  });
}
